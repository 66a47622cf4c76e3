import type { PaperKind } from '../../src-core/paper/paper';

/** Papers as they are chosen from a list. */
export const PAPER_TITLES: Readonly<Record<PaperKind, string>> = {
  'bay-sheet': 'Bay sheet',
  'worked-calculation': 'Worked calculation',
  'visit-report': 'Visit report',
  'off-load-list': 'Off-load list',
  'change-sheet': 'Change sheet for the maker',
  'site-register': 'Site register',
  'draft-notice': 'Draft load notice',
};
