/** What the damages recorded on an upright frame ask for: watch, do not reload, or unload at once. */
import { dateWords } from '../units/dates';
import { lengthOf, ratioOf } from '../units/quantity';
import { classOfDamage, MEMBER_WORDS, type Bend, type DamageJudged, type FoundDamage } from './damage-class';
import { say, type Finding, type Place, type Text, type Verdict, type WorkedStep } from './finding';
import { finding, notAssessable } from './make-finding';
import { listed } from './phrase';
import { ruleValue, sourceOf, type ResolvedRules } from './rule-sets';
import { above, put } from './worked-values';

export interface FrameDamageInput {
  readonly place: Place;
  /** "frame A-F2". */
  readonly frame: string;
  /** What a red frame has to be relieved of: "bay A1", "bay A2", and those tied to it from behind. */
  readonly unload: readonly string[];
  /** "run B" where it is not known whether it is tied to the frame from behind, and so counts as tied. */
  readonly perhapsTied: string | null;
  readonly damages: readonly FoundDamage[];
  readonly twoAmbersMakeRed: boolean;
  readonly rules: ResolvedRules;
  readonly today: string;
}

const VERDICT: Readonly<Record<DamageJudged['class'], Verdict>> = {
  green: 'within',
  amber: 'close',
  red: 'over',
  unclassed: 'not-assessable',
};

/** A finding for each damage, and one more where two ambers count as red; one finding where there is no damage. */
export function frameDamage(input: FrameDamageInput): readonly Finding[] {
  const { place, frame, damages, twoAmbersMakeRed, rules, today } = input;
  if (damages.length === 0)
    return [finding({ check: 'damage', place, verdict: 'within', says: () => say`No damage is recorded on ${frame}.` })];
  const judged = damages.map((damage) => ({ damage, judged: classOfDamage(damage, rules, today) }));
  const found = judged.map(({ damage, judged: one }) => oneFinding(input, damage, one));
  const ambers = judged.flatMap(({ judged: one }) => (one.class === 'amber' ? one.bends.filter((bend) => bend.class === 'amber') : []));
  if (twoAmbersMakeRed && ambers.length > 1 && !judged.some(({ judged: one }) => one.class === 'red'))
    found.push(
      finding({
        check: 'damage',
        place,
        verdict: 'over',
        says: () =>
          say`${ambers.length} bends on ${frame} are amber, and this site counts two ambers on one frame as red. ${unloadNow(input)}`,
        notes: () => [
          say`Counting two ambers as red is inspectors’ practice, not in the standards that could be read; it is a choice of the site.`,
        ],
      }),
    );
  return found;
}

function oneFinding(input: FrameDamageInput, damage: FoundDamage, judged: DamageJudged): Finding {
  const { frame, rules } = input;
  const post = damage.member === 'upright-front' ? 'front' : damage.member === 'upright-rear' ? 'rear' : null;
  const place: Place = post === null ? input.place : { ...input.place, post };
  const member = `The ${MEMBER_WORDS[damage.member]} of ${frame}`;
  const notes = () => notesOf(input, judged);
  const [worst] = judged.bends;
  if (judged.missing.length > 0)
    return notAssessable('damage', place, judged.missing, {
      says: () =>
        judged.class === 'amber' && worst !== undefined
          ? say`${member} ${bent(worst, damage)}: amber, but the day on which it was found is not known. Do not reload what is emptied, and have it repaired.`
          : say`${member} is damaged and cannot be classed: not known is ${listed(judged.missing.map(({ input: what }) => what))}. Treat it as red until it is.`,
      notes,
    });
  const byMillimetres = judged.because === 'measured' || judged.because === 'too-long-amber';
  return finding({
    check: 'damage',
    place,
    verdict: VERDICT[judged.class],
    ...(byMillimetres && worst !== undefined
      ? { demand: lengthOf(worst.measuredMm), allowed: lengthOf(worst.limitMm), utilisation: worst.ratio }
      : {}),
    says: () => {
      if (judged.because === 'torn')
        return say`${member} has a dent, buckle, tear, split or cracked weld, which no millimetres excuse: red. ${unloadNow(input)}`;
      if (judged.because === 'any-damage')
        return say`${member} is damaged, and this rule set asks to unload on any visible damage. ${unloadNow(input)}`;
      if (worst === undefined) return say`${member} is straight.`;
      if (judged.because === 'too-long-amber')
        return say`${member} ${bent(worst, damage)}: amber until ${dateWords(judged.lastAmberDay ?? '')}, and red since. ${unloadNow(input)}`;
      if (judged.class === 'red') return say`${member} ${bent(worst, damage)}: red. ${unloadNow(input)}`;
      if (judged.class === 'green')
        return say`${member} ${bent(worst, damage)}: green. Record it, and measure it again at the next inspection.`;
      return say`${member} ${bent(worst, damage)}: amber. Do not reload what is emptied, and have it repaired by ${dateWords(judged.lastAmberDay ?? '')}; after that day it counts as red.`;
    },
    worked: () =>
      byMillimetres ? judged.bends.filter(({ ratio }) => Number.isFinite(ratio)).flatMap((bend) => worked(bend, damage, rules)) : [],
    notes,
  });
}

function bent({ direction, measuredMm, ratio, limitMm }: Bend, { gaugeMm }: FoundDamage): Text {
  const so = say`is bent ${lengthOf(measuredMm)} ${direction === 'along' ? 'along the run' : 'in the plane of the frame'} over ${lengthOf(gaugeMm)}`;
  return Number.isFinite(ratio)
    ? say`${so}, ${ratioOf(ratio)} times the limit of ${lengthOf(limitMm)}`
    : say`${so}, where this site allows no bend at all`;
}

const unloadNow = ({ unload, perhapsTied }: FrameDamageInput): Text => {
  const now = say`Unload every level of ${listed(unload)} at once, bar them from reloading, and have the part repaired with the maker’s own.`;
  return perhapsTied === null ? now : say`${now} ${countsAsTied(perhapsTied)}`;
};

/** Whoever unloads had better unload too much. */
export const countsAsTied = (run: string): Text =>
  say`Whether row spacers tie ${run} behind it to this frame is not known, so it counts as tied.`;

function notesOf({ rules }: FrameDamageInput, { bends, because }: DamageJudged): readonly Text[] {
  const origins = [...new Set(bends.map(({ rule }) => sourceOf(rules, rule)))];
  return [
    ...(because === 'torn' || origins.length === 0 ? [] : [say`Limit: ${listed(origins)}.`]),
    say`A competent person confirms the class. No share of its rating is left to a damaged part, and none is taken off by this program.`,
  ];
}

function worked(
  { direction, rule, measuredMm, limitMm, ratio }: Bend,
  { gaugeMm }: FoundDamage,
  rules: ResolvedRules,
): readonly WorkedStep[] {
  const way = direction === 'along' ? 'along the run' : 'in the plane of the frame';
  return [
    {
      what: `Limit of a bend ${way}`,
      formula: 'b_m · l / 1000',
      values: [ruleValue(rules, rule, 'b_m'), put('l', 'gauge length, 1 000 mm at most', lengthOf(Math.min(gaugeMm, 1000)), 'inspection')],
      result: { symbol: `b_most_${direction}`, quantity: lengthOf(limitMm) },
      source: sourceOf(rules, rule),
    },
    {
      what: `Bend ${way} over its limit`,
      formula: `b_${direction} / b_most_${direction}`,
      values: [
        put(`b_${direction}`, `bend measured ${way}`, lengthOf(measuredMm), 'inspection'),
        above(`b_most_${direction}`, 'limit', lengthOf(limitMm)),
      ],
      result: { symbol: `r_${direction}`, quantity: ratioOf(ratio) },
      source: 'measured over limit: green up to 1, amber up to the red factor, red above',
    },
  ];
}
