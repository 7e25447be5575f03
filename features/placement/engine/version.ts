/** Changes whenever the same inputs could give another answer; a stored score with another version is stale. */
export const ENGINE_VERSION = '1.0.2';
