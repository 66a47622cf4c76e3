/** The one scale at which all bays of a run stand in the strip, and how wide each is there. */
import type { BayDrawn, Upright } from './bay-model';
import { skylineRate } from './skyline';

/** px: the strip is at most this high, and a usual bay about this wide. */
const TALLEST = 108;
const WIDEST = 92;
/** px that an upright has at least. */
const UPRIGHT = 2;

export interface StripScale {
  /** px per mm. */
  readonly rate: number;
  /** px per N/mm. */
  readonly skyline: number;
  readonly height: number;
}

export function stripScale(bays: readonly BayDrawn[]): StripScale {
  let [highest, widest] = [1, 1];
  for (const bay of bays) {
    highest = Math.max(highest, bay.height);
    widest = Math.max(widest, bay.entry);
  }
  const rate = Math.min(TALLEST / highest, WIDEST / widest);
  return { rate, skyline: skylineRate(bays, rate), height: Math.ceil(highest * rate) + 2 };
}

/** px of an upright. */
export const stripUpright = ({ width }: Upright, rate: number): number => Math.max(UPRIGHT, width * rate);

const drawingWidth = ({ leftUpright, entry, rightUpright }: BayDrawn, rate: number): number =>
  stripUpright(leftUpright, rate) + entry * rate + stripUpright(rightUpright, rate);

/** Parts of the text's size: what its letters are wide at most, near enough. */
const LETTERS: readonly (readonly [RegExp, number])[] = [
  [/[\s.,:;'|!ijlIt()[\]-]/, 0.4],
  [/[MWmw%@&]/, 0.95],
  [/[\p{Lu}]/u, 0.72],
  [/[\u0020-\u024f]/, 0.6],
];
const OTHER_LETTERS = 1.2;

const widths = new Map<string, number>();

/** In parts of the text's size. Kept, as every bay of a run is asked at every edit. */
function roughWidth(text: string): number {
  const known = widths.get(text);
  if (known !== undefined) return known;
  const width = [...text].reduce((sum, letter) => sum + (LETTERS.find(([kind]) => kind.test(letter))?.[1] ?? OTHER_LETTERS), 0);
  widths.set(text, width);
  return width;
}

/** Sizes of a bay's button, rem. */
const BUTTON = { least: 3.25, padding: 0.6, mark: 1.25, gap: 0.3, text: 0.78125, widest: 10 };

/** px that the button of a bay takes: for its drawing, and for its mark and name, of which a long one is cut. The strip needs it before it is drawn. */
export function buttonWidth(bay: BayDrawn, rate: number, rem: number): number {
  const { least, padding, mark, gap, text, widest } = BUTTON;
  const name = Math.min(widest, mark + gap + text * roughWidth(bay.name) + padding) * rem;
  return Math.max(least * rem, drawingWidth(bay, rate) + padding * rem, name);
}
