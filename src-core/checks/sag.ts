/**
 * A measured sag judged: permanent set and sag against their limits, and what load it stands for.
 *
 * Source: facts M-25 (set, limit and range of the implied load; common practice) with the limits of the
 * rule set in force. A small sag proves nothing, and no result of this file is ever "within" on the
 * strength of the implied load alone.
 */
import type { BeamLoad } from '../statics/load';
import { dateWords } from '../units/dates';
import { lengthOf, massOf, quantity, ratioOf, type Quantity } from '../units/quantity';
import { say, verdictOf, worstVerdict, type Missing, type Text, type Verdict, type WorkedStep } from './finding';
import { impliedLoad, type ImpliedLoad } from './implied-load';
import { utilisationOf } from './make-finding';
import { sourceOf, type ResolvedRules } from './rule-sets';
import { impliedSteps, limitSteps } from './sag-worked';

/** Ratios of implied to declared load within which the two agree. Common practice, no source (facts M-25). */
const AGREES_FROM = 0.8;
const AGREES_TO = 1.2;

export interface SagInput {
  /** "the front beam of level 1". */
  readonly beam: string;
  readonly span: number;
  readonly spanFrom: string;
  readonly loadedMm: number | null;
  readonly unloadedMm: number | null;
  readonly sidewaysMm: number | null;
  /** ISO day of the reading, empty where it is not known; null while it is being read. */
  readonly found: string | null;
  /** Start of the readings' fields in the site model: "level:a1-l1:sags.front.". */
  readonly field: string;
  /** Null where I or E is not known. */
  readonly section: {
    /** EI of one beam, N·mm². */
    readonly rigidity: number;
    readonly from: string;
    /** Fixity of its ends from the connector's stiffness; null where that is not known. */
    readonly fixity: number | null;
  } | null;
  /** The declared load on this beam, and the declared mass of the whole level. */
  readonly declared: { readonly load: BeamLoad; readonly kg: number } | null;
  /** Rating of the pair. */
  readonly rated: { readonly kg: number; readonly from: string } | null;
  readonly rules: ResolvedRules;
}

/** One reading against its limit, in the unit of its kind. */
interface AgainstLimit {
  readonly measured: Quantity;
  readonly limit: Quantity;
  /** Measured over limit. */
  readonly ratio: number;
}

export interface SagJudgement {
  /** Of the limits; by the implied load only worse: over where it is beyond the rating even with pinned ends. */
  readonly verdict: Verdict;
  /** The beams of this level may not be used again: the permanent set is beyond its limit. */
  readonly outOfUse: boolean;
  /** Allowed sag, and what was found; mm and per cent of the limit. Null where not measured. */
  readonly limitMm: number;
  readonly elasticMm: number | null;
  readonly setPercent: number | null;
  readonly sidewaysPercent: number | null;
  /** From pinned ends to ends of the likely, or known, fixity; null without section data. */
  readonly implied: { readonly pinned: ImpliedLoad; readonly stiffer: ImpliedLoad } | null;
  /** By the sag at the rated load, where there is no section data: the load is at least this, kg on the pair. */
  readonly atLeastKg: number | null;
  /** What decides: the reading nearest to its limit or furthest beyond, or the implied load. Null where nothing was read. */
  readonly decides: AgainstLimit | null;
  readonly says: readonly Text[];
  readonly missing: readonly Missing[];
  readonly worked: readonly WorkedStep[];
  readonly notes: readonly Text[];
}

/**
 * @throws RangeError if a reading is negative
 * @example span 2 700 mm, 17 mm loaded and 4 mm unloaded in the European set → allowed 13.5 mm, set 29.6 %: over, out of use
 */
export function judgeSag(input: SagInput): SagJudgement {
  const { loadedMm, unloadedMm, sidewaysMm, rules } = input;
  for (const reading of [loadedMm, unloadedMm, sidewaysMm])
    if (reading !== null && !(reading >= 0)) throw new RangeError(`a sag reading must be 0 mm or more, got ${reading}`);
  const limitMm = input.span / rules.value.deflectionDivisor;
  const elastic = loadedMm === null || unloadedMm === null ? null : loadedMm - unloadedMm;
  const impossible = elastic !== null && elastic < 0;
  const elasticMm = impossible ? null : elastic;
  const percent = (mm: number | null) => (mm === null ? null : (100 * mm) / limitMm);
  const setPercent = percent(unloadedMm);
  const sidewaysPercent = percent(sidewaysMm);
  const loaded = loadedMm === null ? null : against(lengthOf(loadedMm), lengthOf(limitMm));
  const setAllowedMm = (limitMm * rules.value.setVertical) / 100;
  const setAtMost = boundOfSet(input, setAllowedMm);
  const setPercentOrMore = setPercent ?? percent(setAtMost);
  const set = setPercentOrMore === null ? null : against(percentOf(setPercentOrMore), percentOf(rules.value.setVertical));
  const sideways = sidewaysPercent === null ? null : against(percentOf(sidewaysPercent), percentOf(rules.value.setHorizontal));
  const [worst = null] = [loaded, set, sideways].filter((one) => one !== null).sort((a, b) => b.ratio - a.ratio);
  const implied = elasticMm === null ? null : impliedRange(input, elasticMm);
  const atLeastKg = elasticMm === null || implied !== null || input.rated === null ? null : (input.rated.kg * elasticMm) / limitMm;
  const missing = missingReadings(input, impossible, setAtMost !== null);
  const byLimit = worst === null ? 'not-assessable' : verdictOf(worst.ratio, rules.value.closeAbove);
  const byLoad = verdictOfLoad(input, implied);
  const tooHeavy = byLoad === 'over' && byLimit !== 'over' && implied !== null && input.rated !== null;
  const found = { limitMm, elasticMm, setPercent, sidewaysPercent, implied, atLeastKg };
  const limited = { ...found, loaded, set, setAllowedMm, setAtMost, sideways, outOfUse: isOver(set) || isOver(sideways), elastic };
  return {
    ...found,
    verdict: worstVerdict([byLimit, byLoad, ...(missing.length > 0 ? (['not-assessable'] as const) : [])]),
    outOfUse: limited.outOfUse,
    decides: tooHeavy ? against(massOf(implied.pinned.evenKg), massOf(input.rated.kg)) : worst,
    missing,
    says: [
      ...limitSays(input, limited),
      ...loadSays(input, implied, byLoad),
      ...whatToDo(limited.outOfUse, isOver(loaded) || byLoad === 'over'),
      ...dayRead(input),
    ],
    worked: [...limitSteps(input, limited), ...impliedSteps(input, found)],
    notes: [
      ...impliedSays(input, implied, atLeastKg),
      ...(implied || atLeastKg !== null
        ? [
            say`A pinned beam reads the load too low, because connectors stiffen the beam. A small sag proves nothing: it is never a licence to add load.`,
          ]
        : []),
      ...(implied && input.found !== null ? [say`The sag is compared with the goods as they are entered now.`] : []),
      ...(elasticMm !== null && implied === null && atLeastKg === null
        ? [say`Neither the beam’s section nor a rating is known, so the sag tells nothing of the load.`]
        : []),
      say`Limits: ${limitOrigins(input)}.`,
    ],
  };
}

const percentOf = (value: number): Quantity => quantity('percent', value);

const against = (measured: Quantity, limit: Quantity): AgainstLimit => ({
  measured,
  limit,
  ratio: utilisationOf(measured.value, limit.value),
});

const isOver = (one: AgainstLimit | null): boolean => one !== null && verdictOf(one.ratio, 1) === 'over';

type Found = Pick<SagJudgement, 'limitMm' | 'elasticMm' | 'setPercent' | 'sidewaysPercent' | 'implied' | 'atLeastKg'>;
interface Limited extends Found {
  /** What may stay bent down, mm. */
  readonly setAllowedMm: number;
  /** Loaded sag that stands for a set that was not read, mm; null where it was read, or where it must be. */
  readonly setAtMost: number | null;
  readonly loaded: AgainstLimit | null;
  readonly set: AgainstLimit | null;
  readonly sideways: AgainstLimit | null;
  readonly outOfUse: boolean;
  /** Loaded less unloaded, even where that cannot be. */
  readonly elastic: number | null;
}

function limitSays(
  { beam, loadedMm, unloadedMm, sidewaysMm }: SagInput,
  { loaded, set, setAllowedMm, setAtMost, sideways, elastic, limitMm }: Limited,
): readonly Text[] {
  const sentences: ((it: string) => Text)[] = [
    ...(unloadedMm === null || set === null ? [] : [(it: string) => setSays(it, 'down', unloadedMm, set)]),
    ...(sidewaysMm === null || sideways === null ? [] : [(it: string) => setSays(it, 'sideways', sidewaysMm, sideways)]),
    ...(loadedMm === null || loaded === null
      ? []
      : [(it: string) => say`Loaded, ${it} sags ${lengthOf(loadedMm)}; ${lengthOf(limitMm)} is allowed.`]),
  ];
  return [
    ...sentences.map((sentence, i) => sentence(i === 0 ? beam : 'it')),
    ...(loadedMm !== null && unloadedMm === null
      ? [
          setAtMost === null
            ? say`Unloaded it was not read: empty the level and measure again at the same place. Up to ${lengthOf(setAllowedMm)} may stay bent down.`
            : say`Unloaded it was not read and need not be: what stays bent down is no more than that, and up to ${lengthOf(setAllowedMm)} may.`,
        ]
      : []),
    ...(elastic !== null && elastic < 0
      ? [say`Unloaded it was read ${lengthOf(-elastic)} lower than loaded, which cannot be. Measure both again, from the same line.`]
      : []),
  ];
}

function whatToDo(outOfUse: boolean, overloaded: boolean): readonly Text[] {
  if (outOfUse) return [say`Unload the level, and take both beams out.`];
  return overloaded ? [say`Unload the level: it is overloaded, or what is known of it is wrong.`] : [];
}

const dayRead = ({ found }: SagInput): readonly Text[] =>
  found === null ? [] : [found === '' ? say`The day on which it was read is not known.` : say`Read on ${dateWords(found)}.`];

/** Where each limit that was asked came from, each origin once. */
function limitOrigins({ rules }: SagInput): string {
  const origins = [
    `sag, ${sourceOf(rules, 'deflectionDivisor')}`,
    `set down, ${sourceOf(rules, 'setVertical')}`,
    `set sideways, ${sourceOf(rules, 'setHorizontal')}`,
  ];
  return origins.join('; ');
}

/** Beyond the rounding of the computation. */
const above = (value: number, limit: number): boolean => value > limit * (1 + 1e-12);

/**
 * A beam that sags no further under its goods than may stay bent has no larger set: what is taken off it can
 * only let it rise. So the loaded reading stands for the unloaded one, as long as the load that the whole of
 * it would imply is within the rating as well.
 * @returns mm; null where the set was read, or has to be
 */
function boundOfSet(input: SagInput, allowedMm: number): number | null {
  const { loadedMm, unloadedMm } = input;
  if (loadedMm === null || unloadedMm !== null || above(loadedMm, allowedMm)) return null;
  return verdictOfLoad(input, impliedRange(input, loadedMm)) === 'within' ? loadedMm : null;
}

/** What was not read is not straight: 0 is a reading, an empty field is none. */
function missingReadings(
  { loadedMm, unloadedMm, sidewaysMm, beam, field }: SagInput,
  impossible: boolean,
  setIsBounded: boolean,
): readonly Missing[] {
  const missing = (what: string, how: string, key: 'loadedMm' | 'unloadedMm' | 'sidewaysMm'): Missing => ({
    input: `${what} of ${beam}`,
    how,
    field: `${field}${key}`,
  });
  return [
    ...(loadedMm === null || impossible
      ? [missing('loaded sag', 'Measure it at mid-span from a line through the beam’s ends, with the goods on it.', 'loadedMm')]
      : []),
    ...((unloadedMm === null && !setIsBounded) || impossible
      ? [missing('unloaded sag', 'Empty the level and measure again at the same place.', 'unloadedMm')]
      : []),
    ...(sidewaysMm === null
      ? [missing('sideways set', 'Measure it at mid-span with the level empty. Enter 0 where the beam is straight.', 'sidewaysMm')]
      : []),
  ];
}

function impliedRange(input: SagInput, elastic: number): SagJudgement['implied'] {
  const { section, span, declared, rules } = input;
  if (section === null) return null;
  const given = { elastic, span, rigidity: section.rigidity, declared };
  return { pinned: impliedLoad(given, 0), stiffer: impliedLoad(given, section.fixity ?? rules.value.likelyFixity) };
}

/**
 * Over where even pinned ends imply more than the rating; close where the likely fixity does. It never
 * makes anything better, and that it disagrees with the declared load is said, not judged.
 */
function verdictOfLoad({ rated }: SagInput, implied: SagJudgement['implied']): Verdict {
  if (implied === null || rated === null) return 'within';
  if (above(implied.pinned.evenKg, rated.kg)) return 'over';
  return above(implied.stiffer.evenKg, rated.kg) ? 'close' : 'within';
}

function loadSays({ rated }: SagInput, implied: SagJudgement['implied'], byLoad: Verdict): readonly Text[] {
  if (implied === null || rated === null || byLoad === 'within') return [];
  return byLoad === 'over'
    ? [
        say`Even with pinned beam ends it stands for ${massOf(implied.pinned.evenKg)} evenly spread on the pair, more than the ${massOf(rated.kg)} that it is rated for.`,
      ]
    : [
        say`With stiffer beam ends it would stand for ${massOf(implied.stiffer.evenKg)} evenly spread on the pair, more than the ${massOf(rated.kg)} that it is rated for.`,
      ];
}

function setSays(beam: string, way: string, mm: number, set: AgainstLimit): Text {
  const found = say`Unloaded, ${beam} stays bent ${way} by ${lengthOf(mm)}, ${set.measured} of the allowed sag`;
  return isOver(set) ? say`${found}; more than ${set.limit} takes it out of use.` : say`${found}; up to ${set.limit} is tolerated.`;
}

function impliedSays(input: SagInput, implied: SagJudgement['implied'], atLeastKg: number | null): readonly Text[] {
  if (atLeastKg !== null)
    return [
      say`By the sag at the rated load, the pair carries at least as much as ${massOf(atLeastKg)} evenly spread. It may be more: this proves no pass.`,
    ];
  if (implied === null) return [];
  const { pinned, stiffer } = implied;
  const ends = (input.section?.fixity ?? null) === null ? 'with the likely stiffness of its ends' : 'with the known stiffness of its ends';
  if (pinned.declared === null || stiffer.declared === null || input.declared === null)
    return [
      say`The sag stands for ${massOf(pinned.evenKg)} evenly spread on the pair with pinned beam ends, for ${massOf(stiffer.evenKg)} ${ends}.`,
    ];
  const range = say`${massOf(input.declared.kg)} is declared; the sag stands for ${massOf(pinned.declared.kg)} (${ratioOf(pinned.declared.ratio)} times) with pinned beam ends, for ${massOf(stiffer.declared.kg)} (${ratioOf(stiffer.declared.ratio)} times) ${ends}.`;
  const far = stiffer.declared.ratio > AGREES_TO || pinned.declared.ratio < AGREES_FROM;
  return [far ? say`${range} Weigh the goods.` : range];
}
