/** How large a package may be, and what is asked where a visit in it is here in another state. */

/** Largest package, bytes: some hundred photos as a telephone takes them. */
export const PACKAGE_BYTES = 512 * 1024 * 1024;
/** Most parts; a ZIP of the plain kind counts them in 16 bits. */
export const MOST_PARTS = 60_000;
/** More than the listing of as many parts takes. */
export const LISTING_BYTES = 16 * 1024 * 1024;

/** Where a visit is here and in the package and the two differ. */
export const IF_VISIT_DIFFERS = ['keep-both', 'take-theirs'] as const;
export type IfVisitDiffers = (typeof IF_VISIT_DIFFERS)[number];
