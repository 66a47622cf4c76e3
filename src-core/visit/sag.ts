/**
 * A measured sag judged: permanent set and sag against their limits, and what load it stands for.
 *
 * Source: facts M-25 (set, limit and range of the implied load; common practice) with the limits of the
 * rule set in force. A small sag proves nothing, and no result of this file is ever "within" on the
 * strength of the implied load alone.
 */
import { say, type Missing, type Text, type Verdict, type WorkedStep } from '../checks/finding';
import type { ResolvedRules } from '../checks/rule-sets';
import type { BeamLoad } from '../statics/load';
import { lengthOf, massOf, quantity, ratioOf } from '../units/quantity';
import { impliedLoad, type ImpliedLoad } from './implied-load';
import { sagSteps } from './sag-worked';

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

export interface SagJudgement {
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
  readonly says: readonly Text[];
  readonly missing: readonly Missing[];
  readonly worked: readonly WorkedStep[];
  readonly notes: readonly Text[];
}

/** @throws RangeError if a reading is negative */
export function judgeSag(input: SagInput): SagJudgement {
  const { loadedMm, unloadedMm, sidewaysMm, rules, beam } = input;
  for (const reading of [loadedMm, unloadedMm, sidewaysMm])
    if (reading !== null && !(reading >= 0)) throw new RangeError(`a sag reading must be 0 mm or more, got ${reading}`);
  const limitMm = input.span / rules.value.deflectionDivisor;
  const elastic = loadedMm === null || unloadedMm === null ? null : loadedMm - unloadedMm;
  const percent = (mm: number | null) => (mm === null ? null : (100 * mm) / limitMm);
  const setPercent = percent(unloadedMm);
  const sidewaysPercent = percent(sidewaysMm);
  const setOver = setPercent !== null && above(setPercent, rules.value.setVertical);
  const sidewaysOver = sidewaysPercent !== null && above(sidewaysPercent, rules.value.setHorizontal);
  const sagOver = loadedMm !== null && above(loadedMm, limitMm);
  const impossible = elastic !== null && elastic < 0;
  const parts = { limitMm, elasticMm: impossible ? null : elastic, setPercent, sidewaysPercent };
  const implied = impossible || elastic === null ? null : impliedRange(input, elastic);
  const atLeastKg =
    impossible || elastic === null || implied !== null || input.rated === null ? null : (input.rated.kg * elastic) / limitMm;
  const missing = missingReadings(input);
  const loadVerdict = verdictOfLoad(input, implied);
  const verdict: Verdict =
    setOver || sidewaysOver || sagOver || loadVerdict === 'over'
      ? 'over'
      : impossible || missing.length > 0
        ? 'not-assessable'
        : loadVerdict === 'close'
          ? 'close'
          : 'within';
  return {
    ...parts,
    verdict,
    outOfUse: setOver || sidewaysOver,
    implied,
    atLeastKg,
    missing,
    says: [
      ...(unloadedMm === null || setPercent === null
        ? []
        : [setSays(beam, 'down', unloadedMm, setPercent, rules.value.setVertical, setOver)]),
      ...(sidewaysMm === null || sidewaysPercent === null
        ? []
        : [setSays(beam, 'sideways', sidewaysMm, sidewaysPercent, rules.value.setHorizontal, sidewaysOver)]),
      ...(loadedMm === null ? [] : [loadedSays(beam, loadedMm, limitMm, sagOver)]),
      ...(impossible
        ? [say`Unloaded it was read ${lengthOf(-elastic)} lower than loaded, which cannot be. Measure both again, from the same line.`]
        : []),
      ...impliedSays(input, implied, atLeastKg),
    ],
    worked: sagSteps(input, { ...parts, implied, atLeastKg }),
    notes: [
      ...(implied || atLeastKg !== null
        ? [
            say`A pinned beam reads the load too low, because connectors stiffen the beam. A small sag proves nothing: it is never a licence to add load.`,
          ]
        : []),
      ...(elastic !== null && implied === null && atLeastKg === null && !impossible
        ? [say`Neither the beam’s section nor a rating is known, so the sag tells nothing of the load.`]
        : []),
    ],
  };
}

/** Beyond the rounding of the computation. */
const above = (value: number, limit: number): boolean => value > limit * (1 + 1e-12);

function missingReadings({ loadedMm, unloadedMm, beam }: SagInput): readonly Missing[] {
  const missing = (state: string, how: string): Missing => ({ input: `sag of ${beam} ${state}`, how, field: '' });
  return [
    ...(loadedMm === null ? [missing('loaded', 'Measure it at mid-span from a line through the beam’s ends, with the goods on it.')] : []),
    ...(unloadedMm === null ? [missing('unloaded', 'Measure it again at the same place once the level is empty.')] : []),
  ];
}

function impliedRange(input: SagInput, elastic: number): SagJudgement['implied'] {
  const { section, span, declared, rules } = input;
  if (section === null) return null;
  const given = { elastic, span, rigidity: section.rigidity, declared };
  return { pinned: impliedLoad(given, 0), stiffer: impliedLoad(given, section.fixity ?? rules.value.likelyFixity) };
}

/**
 * Over where even pinned ends imply more than the rating; close where the likely fixity does, or where
 * implied and declared load disagree. Never better than within.
 */
function verdictOfLoad({ rated }: SagInput, implied: SagJudgement['implied']): Verdict {
  if (implied === null) return 'within';
  if (rated !== null && above(implied.pinned.evenKg, rated.kg)) return 'over';
  if (rated !== null && above(implied.stiffer.evenKg, rated.kg)) return 'close';
  const ratios = [implied.pinned, implied.stiffer].flatMap(({ declared }) => (declared === null ? [] : [declared.ratio]));
  return ratios.some((ratio) => ratio < AGREES_FROM || above(ratio, AGREES_TO)) ? 'close' : 'within';
}

function setSays(beam: string, way: string, mm: number, percent: number, limit: number, over: boolean): Text {
  const found = say`Unloaded, ${beam} stays bent ${way} by ${lengthOf(mm)}, ${quantity('percent', percent)} of the allowed sag`;
  const allowed = quantity('percent', limit);
  return over ? say`${found}; more than ${allowed} takes it out of use.` : say`${found}; up to ${allowed} is tolerated.`;
}

function loadedSays(beam: string, mm: number, limitMm: number, over: boolean): Text {
  const found = say`Loaded, ${beam} sags ${lengthOf(mm)}; ${lengthOf(limitMm)} is allowed.`;
  return over ? say`${found} Unload the level: it is overloaded, or what is known of it is wrong.` : found;
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
