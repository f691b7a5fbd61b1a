/** Raised whenever a number that somebody was shown could come out differently. Stored with every run. */
export const ENGINE_VERSION = '1.2.0';
