/** The most that a JSON body may hold once unpacked. */
export const bodyLimit = { bytes: 1_048_576, words: '1 MB' };
