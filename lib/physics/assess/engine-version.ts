/** Stored with every result. Raised whenever the same case could be answered differently. */
export const ENGINE_VERSION = '1.1.0';
