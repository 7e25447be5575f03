/** Stands in for packages that only guard a bundler (server-only). */
export {};
