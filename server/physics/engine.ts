/** Version of the numerical core; it goes up with every change that could change a figure of an estimate. */
export const engineVersion = '1.0.0';
