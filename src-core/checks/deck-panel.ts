/**
 * Deck and shelf panels one by one: each as a beam from front to rear under its part of the goods, turned
 * into the evenly spread load that would bend it alike, against the panel's own rating.
 *
 * Source: facts M-08; W·(2 − b/span) for a centred strip of length b is what the beam gives for it.
 */
import { solveBeam, type BeamAnswer } from '../statics/beam';
import { equivalentLoads } from '../statics/equivalent';
import type { BeamLoad } from '../statics/load';
import { countOf, forceOf, lengthOf, massOf, massWeighing, momentOf, ratioOf } from '../units/quantity';
import { say, type Finding, type Missing, type Place, type Text, type WorkedStep } from './finding';
import { leftOf } from './left-of';
import type { LevelRating } from './level-rating';
import { compared, distinctMissing, finding, notAssessable } from './make-finding';
import { inside } from './phrase';
import { ruleQuantity, sourceOf, type ResolvedRules } from './rule-sets';
import { utilisationStep } from './unit-load';
import { above, GRAVITY, put } from './worked-values';

/** A unit load as it stands on the deck. Lengths in mm. */
export interface OnDeck {
  readonly placementId: string;
  readonly name: string;
  /** N along the bay, x from the left upright's face; null where it is not known. */
  readonly along: BeamLoad | null;
  /** 1 N across the rack, from the goods' own rear edge. */
  readonly across: BeamLoad;
  readonly from: number;
  readonly to: number;
  /** Rear and front edge in front of the middle of the rack. */
  readonly rear: number;
  readonly front: number;
  readonly missing: readonly Missing[];
}

export interface DeckPanelInput {
  readonly place: Place;
  readonly level: string;
  readonly panels: {
    /** Equal panels side by side. */
    readonly count: number;
    /** Rated evenly spread mass of one, kg; null = only the level is rated. */
    readonly ratedKg: number | null;
    readonly from: string;
  };
  readonly rated: LevelRating;
  readonly clearEntry: number;
  /** Length of a panel from front to rear, taken as the depth of the frame, mm; null = not known. */
  readonly depth: number | null;
  readonly depthMissing: readonly Missing[];
  readonly goods: readonly OnDeck[];
  readonly rules: ResolvedRules;
}

/** Mass, kg on the panel; the beam's answer under it; and what governs. */
interface PanelLoad {
  readonly index: number;
  readonly massKg: number;
  readonly load: BeamLoad;
  readonly answer: BeamAnswer;
  readonly bendingKg: number;
  readonly deflectionKg: number;
  /** Greatest of the three. */
  readonly kg: number;
  /** Share of the panel's area under goods. */
  readonly covered: number;
  readonly names: readonly string[];
}

// Any rigidity gives the same bending; the deflection's equivalent does not depend on it.
const RIGIDITY = 1e10;
const PINNED = { kind: 'pinned' } as const;

/** One finding for each panel that is over; else one for the most used. */
export function deckPanel(input: DeckPanelInput): readonly Finding[] {
  const { place, level, panels, goods, depth, depthMissing, rated } = input;
  if (goods.length === 0)
    return [finding({ check: 'deck-panel', place, verdict: 'within', says: () => say`No goods stand on the deck of ${inside(level)}.` })];
  const share = panels.ratedKg ?? (rated.kg === null ? null : rated.kg / panels.count);
  const missing = distinctMissing([
    ...goods.flatMap((one) => one.missing),
    ...(depth === null ? depthMissing : []),
    ...(share === null ? rated.missing : []),
  ]);
  if (missing.length > 0 || depth === null || share === null) return [notAssessable('deck-panel', place, missing)];
  if (goods.some(({ along }) => along === null))
    return [
      finding({
        check: 'deck-panel',
        place,
        verdict: 'not-possible',
        says: () => say`Not worked out: goods on ${inside(level)} cannot stand as they were entered.`,
      }),
    ];
  const judged = panelLoads(input, depth).map((panel) => judge(input, panel, share, depth));
  const over = judged.filter(({ verdict }) => verdict === 'over');
  if (over.length > 0) return over;
  const worst = judged.reduce<Finding | null>((most, one) => (most === null || heavier(one, most) ? one : most), null);
  return worst === null
    ? [finding({ check: 'deck-panel', place, verdict: 'within', says: () => say`No goods stand on the panels of ${inside(level)}.` })]
    : [worst];
}

const heavier = (one: Finding, other: Finding): boolean =>
  (one.verdict === 'close') !== (other.verdict === 'close') ? one.verdict === 'close' : (one.utilisation ?? 0) > (other.utilisation ?? 0);

/** Panels that carry something. */
function panelLoads({ panels, clearEntry, goods }: DeckPanelInput, depth: number): readonly PanelLoad[] {
  const width = clearEntry / panels.count;
  const loads: PanelLoad[] = [];
  for (let index = 0; index < panels.count; index++) {
    const from = index * width;
    // The last panel ends where the bay does, without the rounding of its width.
    const to = index === panels.count - 1 ? clearEntry : from + width;
    const parts = goods.flatMap((one) => {
      const force = one.along === null ? 0 : forceBetween(one.along, from, to, index === panels.count - 1);
      return force > 0 ? [{ one, force }] : [];
    });
    if (parts.length === 0) continue;
    const load = together(parts.map(({ one, force }) => strip(one, force, depth)));
    const answer = solveBeam({ span: depth, rigidity: RIGIDITY, left: PINNED, right: PINNED }, load);
    const even = equivalentLoads(answer, RIGIDITY);
    const massKg = massWeighing(parts.reduce((sum, { force }) => sum + force, 0));
    const bendingKg = massWeighing(even.bending);
    const deflectionKg = massWeighing(even.deflection);
    const area = parts.reduce((sum, { one }) => {
      const along = Math.min(one.to, to) - Math.max(one.from, from);
      const across = Math.min(one.front, depth / 2) - Math.max(one.rear, -depth / 2);
      return sum + Math.max(0, along) * Math.max(0, across);
    }, 0);
    loads.push({
      index,
      massKg,
      load,
      answer,
      bendingKg,
      deflectionKg,
      kg: Math.max(massKg, bendingKg, deflectionKg),
      covered: area / ((to - from) * depth),
      names: parts.map(({ one }) => one.name),
    });
  }
  return loads;
}

/** N of a load from `from` up to `to`; a point on a joint goes to the panel on its right, at the far end to the last. */
function forceBetween({ lines, points }: BeamLoad, from: number, to: number, last: boolean): number {
  let force = 0;
  for (const line of lines) {
    const a = Math.max(line.from, from);
    const b = Math.min(line.to, to);
    if (b <= a) continue;
    const at = (x: number) => line.wFrom + ((line.wTo - line.wFrom) * (x - line.from)) / (line.to - line.from);
    force += ((b - a) * (at(a) + at(b))) / 2;
  }
  for (const point of points) if (point.at >= from && (point.at < to || (last && point.at <= to))) force += point.force;
  return force;
}

/** The goods' part as it lies on the panel's span, rear to front; what hangs over its ends is on the beams. */
function strip({ across, rear }: OnDeck, force: number, depth: number): BeamLoad {
  const start = depth / 2 + rear;
  const lines = across.lines.flatMap((line) => {
    const from = Math.max(0, start + line.from);
    const to = Math.min(depth, start + line.to);
    if (!(to > from)) return [];
    const at = (x: number) => force * (line.wFrom + ((line.wTo - line.wFrom) * (x - start - line.from)) / (line.to - line.from));
    return [{ from, to, wFrom: Math.max(0, at(from)), wTo: Math.max(0, at(to)) }];
  });
  const points = across.points.flatMap((point) => {
    const at = start + point.at;
    return at >= 0 && at <= depth ? [{ at, force: force * point.force }] : [];
  });
  return { lines, points };
}

const together = (loads: readonly BeamLoad[]): BeamLoad => ({
  lines: loads.flatMap(({ lines }) => lines),
  points: loads.flatMap(({ points }) => points),
});

function judge(input: DeckPanelInput, panel: PanelLoad, shareKg: number, depth: number): Finding {
  const { place, panels, rules, level } = input;
  const result = compared(massOf(panel.kg), massOf(shareKg), rules.value.closeAbove);
  const concentrated = panel.covered < rules.value.deckFootprint * (1 - 1e-12);
  const verdict = result.verdict === 'within' && concentrated ? 'close' : result.verdict;
  const which = `panel ${panel.index + 1} of ${panels.count} from the left`;
  const says = (): Text => {
    const carries = say`On ${inside(level)}, ${which} carries ${massOf(panel.massKg)}`;
    const counts =
      panel.kg > panel.massKg * (1 + 1e-9) ? say`${carries}, which bends it as ${massOf(panel.kg)} evenly spread would` : carries;
    const allows = say`${counts}; ${panels.ratedKg === null ? 'its part of the level’s rating' : 'its rating'} is ${massOf(shareKg)}.`;
    if (result.verdict === 'over')
      return say`${allows} Lay a board under the goods that spreads them over more panels, or put them on a stronger level or the floor.`;
    return concentrated
      ? say`${allows} The base is small and outside a deck’s rating, which is for load spread evenly: lay a board under it.`
      : allows;
  };
  return finding({
    check: 'deck-panel',
    place,
    ...result,
    verdict,
    says,
    worked: () => worked(input, panel, shareKg, depth),
    notes: () => [
      say`By mass ${massOf(panel.massKg)}, by bending ${massOf(panel.bendingKg)}, by deflection ${massOf(panel.deflectionKg)}, each as an even load on the panel. It is taken to span the depth of the frame, which is the safe side.`,
      ...(panels.ratedKg === null
        ? [
            say`The panel’s own rating is not stated: the level’s rating shared among its ${panels.count} panels is used (common practice, no source).`,
          ]
        : []),
      say`The goods cover ${ratioOf(panel.covered)} of the panel; below ${ruleQuantity(rules, 'deckFootprint')} a base counts as concentrated (${sourceOf(rules, 'deckFootprint')}).`,
      say`A deck’s rating is for evenly spread load at rest; point and line loads, wheels and climbing are outside it, and it adds nothing to the beams’.`,
    ],
  });
}

function worked({ panels, rated }: DeckPanelInput, panel: PanelLoad, shareKg: number, depth: number): readonly WorkedStep[] {
  const { answer, load } = panel;
  const rating = panels.ratedKg === null ? [ratingStep(rated, panels.count, shareKg)] : [];
  const allowed = put('m_panel', 'rating of the panel', massOf(shareKg), panels.ratedKg === null ? 'line above' : panels.from);
  if (panel.kg > panel.bendingKg) {
    const byMass = panel.kg === panel.massKg;
    const what = byMass ? 'mass on the panel' : 'even load that makes it sag alike';
    return [
      ...rating,
      utilisationStep(
        put('m', what, massOf(panel.kg), byMass ? 'goods and where they stand' : 'beam from front to rear'),
        allowed,
        'panel by panel',
      ),
    ];
  }
  const x = answer.sagging.from;
  const behind = leftOf(load, x);
  return [
    ...rating,
    {
      what: 'Greatest bending moment of the panel, x from its rear end',
      formula: 'R · x − W_x · a',
      values: [
        put('R', 'reaction at its rear end', forceOf(answer.reactionLeft), 'statics: moments about its front end'),
        put('x', 'place of the greatest moment', lengthOf(x), 'where the shear passes through zero'),
        put('W_x', 'load behind that place', forceOf(behind.force), 'goods and where they stand'),
        put('a', 'distance back to the middle of that load', lengthOf(behind.arm), 'goods and where they stand'),
      ],
      result: { symbol: 'M', quantity: momentOf(answer.sagging.moment) },
      source: 'statics',
    },
    {
      what: 'Evenly spread mass that bends it alike',
      formula: '8 · M / (L · g)',
      values: [
        above('M', 'greatest bending moment', momentOf(answer.sagging.moment)),
        put('L', 'span of the panel', lengthOf(depth), 'depth of the frame'),
        GRAVITY,
      ],
      result: { symbol: 'm_even', quantity: massOf(panel.bendingKg) },
      source: 'equivalent uniform load, W·(2 − b/L) for a centred strip of length b',
    },
    utilisationStep(above('m_even', 'evenly spread mass', massOf(panel.kg)), allowed, 'panel by panel'),
  ];
}

const ratingStep = (rated: LevelRating, count: number, shareKg: number): WorkedStep => ({
  what: 'Panel’s part of the level’s rating',
  formula: 'm_rated / n',
  values: [
    put('m_rated', 'rating of the level', massOf(rated.kg ?? shareKg * count), rated.from),
    put('n', 'equal panels', countOf(count), 'deck of the level'),
  ],
  result: { symbol: 'm_panel', quantity: massOf(shareKg) },
  source: 'common practice, no source: level rating over number of equal panels',
});
