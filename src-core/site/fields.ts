/** Everything that describes the fields of a file, for the site's and other files' schemas. */
export * from './field';
export * from './ids';
export * from './records';
