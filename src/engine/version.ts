/** Part of every stored result and fingerprint. Raised whenever the same input may give another number. */
export const ENGINE_VERSION = '1.1.0';
