/** Raised whenever a figure could change for the same input; stored with every result. */
export const ANALYSIS_VERSION = '1.1.0';
