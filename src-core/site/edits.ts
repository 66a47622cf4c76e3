/** Every edit of a site, `(site, …) => site`: the given site stays as it was, and what is not touched is shared. */
export * from './edits-goods';
export * from './edits-library';
export * from './edits-rack';
export * from './edits-site';
