export const here = true;
