/** The five verdicts as people read them. Shape and colour stand beside these words, never instead. */
import type { Verdict } from '../checks/finding';

export interface VerdictWords {
  readonly word: string;
  /** What the verdict means for whoever stands at the rack. */
  readonly means: string;
}

export const VERDICT_WORDS: Readonly<Record<Verdict, VerdictWords>> = {
  within: { word: 'Within', means: 'The stated loads are within the ratings that were entered.' },
  close: {
    word: 'Close',
    means: 'Within the ratings with little to spare, or the answer changes within what is not known exactly.',
  },
  over: { word: 'Over', means: 'The stated loads go beyond what the ratings prove. Take load off before anything else.' },
  'not-assessable': {
    word: 'Not assessable',
    means: 'Something that the check needs is not known. This is not a pass: treat it as over until it is known.',
  },
  'not-possible': {
    word: 'Not possible',
    means: 'The goods cannot stand as they were entered: they overlap, reach past the level or would tip.',
  },
};
