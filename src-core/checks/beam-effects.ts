/**
 * Bending, end shear and deflection of a level's worse beam, each as the evenly spread load on the pair
 * that would do the same, against the pair's rating.
 */
import { lengthOf, massOf, massWeighing, ratioOf } from '../units/quantity';
import { bendingSteps, deflectionSteps, endShearSteps, endValueSteps } from './beam-worked';
import { compareVerdicts, say, verdictOf, type CheckName, type Finding, type Text, type Verdict } from './finding';
import { compared, finding, notAssessable, utilisationOf } from './make-finding';
import { alike, evenBendingFactor, evenDeflectionFactor, nameOf, worseBeam, type Effect, type PairInput, type WorseBeam } from './pair';
import { opening } from './phrase';
import { worstCase } from './worst-case';

interface EffectWords {
  readonly check: CheckName;
  /** "it bends … as … would". */
  readonly does: (beam: string, even: Text) => Text;
  readonly worked: (input: PairInput, worse: WorseBeam) => Finding['worked'];
}

const BENDING: EffectWords = {
  check: 'beam-bending',
  does: (beam, even) => say`bends ${beam} as ${even} evenly spread on the pair would`,
  worked: bendingSteps,
};
const DEFLECTION: EffectWords = {
  check: 'beam-deflection',
  does: (beam, even) => say`makes ${beam} sag as ${even} evenly spread on the pair would`,
  worked: deflectionSteps,
};
const END_SHEAR: EffectWords = {
  check: 'beam-end-shear',
  does: (beam, even) => say`loads one end of ${beam} as ${even} evenly spread on the pair would`,
  worked: endShearSteps,
};

/**
 * @param counts false where the level is judged as a designed full complement
 */
export const beamBending = (input: PairInput, counts: boolean): Finding => byEvenLoad(input, 'bending', BENDING, counts, evenBendingFactor);
export const beamDeflection = (input: PairInput, counts: boolean): Finding =>
  byEvenLoad(input, 'deflection', DEFLECTION, counts, evenDeflectionFactor);

function byEvenLoad(
  input: PairInput,
  effect: Effect,
  words: EffectWords,
  counts: boolean,
  evenFactor: (fixity: number) => number,
): Finding {
  const { rated, rules, place } = input;
  const worse = worseBeam(input, effect);
  if (rated.kg === null) return unrated(input, effect, words, worse, counts);
  const result = compared(massOf(worse.kg), massOf(rated.kg), rules.value.closeAbove);
  const range = stifferEnds(input, effect, result.utilisation, result.verdict, evenFactor);
  const worst = worstCase({ pair: input, effect, ...result, allowedKg: rated.kg, parts: 1, counts, worked: words.worked });
  return finding({
    check: words.check,
    place: { ...place, beam: worse.side },
    ...result,
    verdict: range.changes || worst.changes ? 'close' : result.verdict,
    counts,
    says: () => say`${sentence(input, words, worse, result.verdict)}${worst.why()}`,
    worked: () => [...words.worked(input, worse), ...worst.worked()],
    notes: () => [
      ...where(input, worse, effect),
      ...otherBeam(input, worse),
      ...worst.notes(),
      ...range.notes(),
      ...rated.notes,
      ...sprungNote(input),
      ...notCounted(counts),
    ],
  });
}

/**
 * By end shear a notice proves half the pair's rating at the two beam ends of one side. A maker's value
 * for one beam end takes its place, and then counts for a full complement too.
 */
export function beamEndShear(input: PairInput, end: { readonly kg: number | null; readonly from: () => string }, counts: boolean): Finding {
  const { rated, rules, level } = input;
  const worse = worseBeam(input, 'endShear');
  const { reactionLeft, reactionRight } = worse.beam.answer;
  const place = { ...input.place, beam: worse.side, end: reactionRight > reactionLeft ? ('right' as const) : ('left' as const) };
  if (end.kg !== null) {
    const endKg = end.kg;
    const onEnd = massOf(massWeighing(Math.max(reactionLeft, reactionRight)));
    const result = compared(onEnd, massOf(endKg), rules.value.closeAbove);
    const worked = (pair: PairInput, beam: WorseBeam) => endValueSteps(pair, beam, { kg: endKg, from: end.from() });
    // The maker's value is for one beam end, which carries a quarter of the pair's even load.
    const worst = worstCase({ pair: input, effect: 'endShear', ...result, allowedKg: endKg, parts: 4, counts: true, worked });
    return finding({
      check: 'beam-end-shear',
      place,
      ...result,
      verdict: worst.changes ? 'close' : result.verdict,
      says: () =>
        say`${level} puts ${onEnd} on the ${place.end} end of ${nameOf(input, worse.side)}. Its maker states ${massOf(endKg)} for one end.${worst.why()}`,
      worked: () => [...worked(input, worse), ...worst.worked()],
      notes: () => [...otherBeam(input, worse), ...worst.notes()],
    });
  }
  if (rated.kg === null) return unrated(input, 'endShear', END_SHEAR, worse, counts);
  const result = compared(massOf(worse.kg), massOf(rated.kg), rules.value.closeAbove);
  const worst = worstCase({ pair: input, effect: 'endShear', ...result, allowedKg: rated.kg, parts: 1, counts, worked: endShearSteps });
  return finding({
    check: 'beam-end-shear',
    place,
    ...result,
    verdict: worst.changes ? 'close' : result.verdict,
    counts,
    says: () =>
      result.verdict === 'over'
        ? say`${sentence(input, END_SHEAR, worse, result.verdict)} That is beyond what the notice proves for a beam end: ask the maker for the value of one end, or move goods away from it.`
        : say`${sentence(input, END_SHEAR, worse, result.verdict)}${worst.why()}`,
    worked: () => [...endShearSteps(input, worse), ...worst.worked()],
    notes: () => [...otherBeam(input, worse), ...worst.notes(), ...rated.notes, ...notCounted(counts)],
  });
}

/** "Level 2 carries 1 990 kg, but it bends the front beam as 2 679 kg evenly spread on the pair would. The notice allows 2 200 kg." */
function sentence(input: PairInput, words: EffectWords, worse: WorseBeam, verdict: Verdict): Text {
  const { level, totalKg, rated } = input;
  const even = say`${massOf(worse.kg)}`;
  const joined = verdict === 'over' && rated.kg !== null && totalKg <= rated.kg ? ', but it' : ' and';
  const allows = rated.kg === null ? say`` : say` ${opening(rated.by)} allows ${massOf(rated.kg)}.`;
  return say`${level} carries ${massOf(totalKg)}${joined} ${words.does(nameOf(input, worse.side), even)}.${allows}`;
}

function unrated(input: PairInput, effect: Effect, words: EffectWords, worse: WorseBeam, counts: boolean): Finding {
  const stated = { verdict: 'not-assessable', utilisation: null, allowedKg: null } as const;
  const worst = worstCase({ pair: input, effect, ...stated, parts: 1, counts, worked: words.worked });
  return notAssessable(words.check, { ...input.place, beam: worse.side }, input.rated.missing, {
    counts,
    demand: massOf(worse.kg),
    says: () => say`${sentence(input, words, worse, 'not-assessable')} What the pair may carry is not known.`,
    worked: () => [...words.worked(input, worse), ...worst.worked()],
    notes: () => [...otherBeam(input, worse), ...worst.notes()],
  });
}

interface Range {
  /** The verdict gets worse inside the range, without being over already. */
  readonly changes: boolean;
  readonly notes: () => readonly Text[];
}

/**
 * What the verdict would be with ends of the likely fixity. An over by pinned ends stays over: that the
 * ends are stiffer is not known. Solved at once only where it could make the verdict worse, since stiffer
 * ends lower the effect itself and so raise the even load at most by the even load's own factor.
 */
function stifferEnds(
  input: PairInput,
  effect: Effect,
  utilisation: number,
  verdict: Verdict,
  evenFactor: (fixity: number) => number,
): Range {
  const { stiffer, rated, rules } = input;
  if (stiffer === null || rated.kg === null) return { changes: false, notes: () => [] };
  const ratedKg = rated.kg;
  const { likelyFixity, closeAbove } = rules.value;
  const there = () => {
    const { front, rear } = stiffer();
    return Math.max(front[effect], rear[effect]);
  };
  const couldChange = verdict !== 'over' && utilisation / evenFactor(likelyFixity) > closeAbove;
  const stiffVerdict = couldChange ? verdictOf(utilisationOf(there(), ratedKg), closeAbove) : verdict;
  const changes = compareVerdicts(stiffVerdict, verdict) > 0;
  return {
    changes,
    notes: () => {
      const kg = there();
      const range = say`With pinned beam ends it counts as ${massOf(utilisation * ratedKg)}; with a fixity of ${ratioOf(likelyFixity)}, which connectors may have, as ${massOf(kg)} (utilisation ${ratioOf(utilisationOf(kg, ratedKg))}).`;
      return changes
        ? [say`${range} The verdict changes inside this range, so it is close. Ask the maker for the connector’s stiffness.`]
        : [range];
    },
  };
}

const otherBeam = (input: PairInput, worse: WorseBeam): readonly Text[] =>
  alike(input) ? [] : [say`By the same measure the ${worse.side === 'front' ? 'rear' : 'front'} beam counts as ${massOf(worse.otherKg)}.`];

const sprungNote = (input: PairInput): readonly Text[] =>
  input.fixity > 0 ? [say`The stiffness of the connectors is known (fixity ${ratioOf(input.fixity)}) and is used for both loads.`] : [];

const notCounted = (counts: boolean): readonly Text[] =>
  counts
    ? []
    : [
        say`For information: this level is judged as a designed full complement, by its total and its unit loads. Ordinary put-away is part of that loading, so the worst case does not count against it.`,
      ];

/** Where the beam bends most: a place, or a stretch where the moment is level. */
function where(input: PairInput, { side, beam }: WorseBeam, effect: Effect): readonly Text[] {
  if (effect !== 'bending' || beam.answer.resultant === 0) return [];
  const { from, to } = beam.answer.sagging;
  const place = to > from ? say`between ${lengthOf(from)} and ${lengthOf(to)}` : say`at ${lengthOf(from)}`;
  return [say`${opening(nameOf(input, side))} bends most ${place} from its left support.`];
}
