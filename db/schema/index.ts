/** The list of table files, for the client and the migration tool. */
export * from './accounts';
export * from './fields';
export * from './growers';
export * from './imports';
export * from './line-up';
export * from './placement';
export * from './plans';
export * from './soil';
