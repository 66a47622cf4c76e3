/** Does the upright frame stand upright enough, by its plumb survey, loaded or unloaded. */
import { lengthOf, ratioOf } from '../units/quantity';
import { say, type Finding, type Missing, type Place, type WorkedStep } from './finding';
import { compared, finding, notAssessable } from './make-finding';
import { opening } from './phrase';
import { ruleValue, sourceOf, type ResolvedRules } from './rule-sets';
import { above, put } from './worked-values';

export interface PlumbSurvey {
  /** Offsets at `heightMm`, along the run and across it, either sign. */
  readonly alongMm: number;
  readonly acrossMm: number;
  readonly heightMm: number;
  readonly loaded: boolean;
}

export interface PlumbInput {
  readonly place: Place;
  readonly frame: string;
  readonly survey: PlumbSurvey | null;
  readonly missing: Missing;
  readonly rules: ResolvedRules;
}

/** Source: facts M-29 and F-36 to F-41; limits differ for loaded and unloaded racks. */
export function plumb({ place, frame, survey, missing, rules }: PlumbInput): Finding {
  if (survey === null) return notAssessable('plumb', place, [missing]);
  const key = survey.loaded ? 'plumbLoadedDivisor' : 'plumbUnloadedDivisor';
  const across = Math.abs(survey.acrossMm) > Math.abs(survey.alongMm);
  const offset = lengthOf(Math.max(Math.abs(survey.alongMm), Math.abs(survey.acrossMm)));
  const limit = lengthOf(survey.heightMm / rules.value[key]);
  const way = across ? 'across the run' : 'along the run';
  const state = survey.loaded ? 'loaded' : 'unloaded';
  const result = compared(offset, limit, rules.value.closeAbove);
  return finding({
    check: 'plumb',
    place,
    ...result,
    says: () => {
      const so = say`${opening(frame)} leans ${offset} ${way} over ${lengthOf(survey.heightMm)}, ${state}; ${limit} is allowed, the height over ${ratioOf(rules.value[key])}.`;
      if (result.verdict !== 'over') return so;
      return rules.set === 'united-states'
        ? say`${so} Unload it and set it plumb before it is loaded again.`
        : say`${so} Unload it, and have it set plumb and its anchors and bracing looked at.`;
    },
    worked: (): readonly WorkedStep[] => [
      {
        what: `Limit, ${state}`,
        formula: 'h / n',
        values: [put('h', 'height at which it was measured', lengthOf(survey.heightMm), 'plumb survey'), ruleValue(rules, key, 'n')],
        result: { symbol: 'l_most', quantity: limit },
        source: sourceOf(rules, key),
      },
      {
        what: 'Utilisation',
        formula: 'l / l_most',
        values: [put('l', `offset ${way}`, offset, 'plumb survey'), above('l_most', 'limit', limit)],
        result: { symbol: 'u', quantity: ratioOf(result.utilisation) },
        source: sourceOf(rules, key),
      },
    ],
    notes: () => [say`Limit: ${sourceOf(rules, key)}. Loaded and unloaded racks have limits of their own.`],
  });
}
