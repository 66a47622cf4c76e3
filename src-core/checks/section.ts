/** Stress and sag of the worse beam as they are, where the maker gives the beam's section. */
import { lengthOf, momentOf, quantity, ratioOf } from '../units/quantity';
import { reactionSteps, saggingSteps, sagSteps } from './beam-worked';
import { say, type CheckName, type Finding, type Missing, type Place, type WorkedStep } from './finding';
import { compared, finding, notAssessable } from './make-finding';
import { nameOf, type LoadedBeam, type OneBeam, type PairInput } from './pair';
import { inside } from './phrase';
import { ruleValue, sourceOf } from './rule-sets';
import { utilisationStep } from './unit-load';

/** One number of a beam's section; null = not known. */
export interface SectionNumber {
  readonly value: number | null;
  readonly missing: () => Missing;
}

/** With none of a check's numbers known it only informs; with some of them, the others must be found. */
function lacking(check: CheckName, place: Place, numbers: readonly SectionNumber[]): Finding {
  const missing = numbers.filter(({ value }) => value === null).map((one) => one.missing());
  const none = missing.length === numbers.length;
  return notAssessable(check, place, missing, {
    counts: !none,
    notes: () => (none ? [say`For information only: no section data is given, and the rating does not need it.`] : []),
  });
}

/** Greatest bending stress against the maker's design stress; stated loads, without load factors. */
export function sectionStress(input: PairInput, modulus: SectionNumber, design: SectionNumber, origin: () => string): Finding {
  if (modulus.value === null || design.value === null) return lacking('section-stress', input.place, [modulus, design]);
  const sectionModulus = quantity('sectionModulus', modulus.value);
  const allowed = quantity('stress', design.value);
  const worse = worseBy(input, greatestMoment);
  const moment = greatestMoment(worse.beam);
  const stress = quantity('stress', moment / sectionModulus.value);
  return finding({
    check: 'section-stress',
    place: { ...input.place, beam: worse.side },
    ...compared(stress, allowed, input.rules.value.closeAbove),
    says: () =>
      say`The greatest bending stress in ${nameOf(input, worse.side)} of ${inside(input.level)} is ${stress} of the ${allowed} that its maker allows.`,
    worked: () => [
      ...momentSteps(input, worse),
      {
        what: 'Greatest bending stress',
        formula: 'M / W_el',
        values: [
          { symbol: 'M', is: 'greatest bending moment', quantity: momentOf(moment), from: 'line above' },
          { symbol: 'W_el', is: 'section modulus of one beam', quantity: sectionModulus, from: origin() },
        ],
        result: { symbol: 'sigma', quantity: stress },
        source: 'strength of materials',
      },
      utilisationStep(
        { symbol: 'sigma', is: 'greatest bending stress', quantity: stress, from: 'line above' },
        { symbol: 'f_d', is: 'design stress', quantity: allowed, from: origin() },
        'maker’s design stress',
      ),
    ],
    notes: () => [say`Stated loads without load factors; twist, buckling and the connectors are not part of it.`],
  });
}

/** Greatest sag in mm against the span over the rule set's divisor. */
export function sectionDeflection(input: PairInput, second: SectionNumber, modulus: SectionNumber, origin: () => string): Finding {
  if (second.value === null || modulus.value === null) return lacking('section-deflection', input.place, [second, modulus]);
  const { rules, span } = input;
  const worse = worseBy(input, ({ answer }) => answer.deflection.sag);
  const sag = lengthOf(worse.beam.answer.deflection.sag);
  const limit = lengthOf(span / rules.value.deflectionDivisor);
  const rigidity = quantity('rigidity', input.rigidity);
  const secondMoment = quantity('secondMoment', second.value);
  const elastic = quantity('stress', modulus.value);
  return finding({
    check: 'section-deflection',
    place: { ...input.place, beam: worse.side },
    ...compared(sag, limit, rules.value.closeAbove),
    says: () =>
      say`${nameOf(input, worse.side) === 'each beam' ? 'Each beam' : `The ${worse.side} beam`} of ${inside(input.level)} sags ${sag}. The limit is ${limit}, the span over ${ratioOf(rules.value.deflectionDivisor)} (${sourceOf(rules, 'deflectionDivisor')}).`,
    worked: () => {
      const { bent, steps } = sagSteps(input, worse);
      return [
        ...reactionSteps(input, worse),
        ...steps,
        {
          what: 'Flexural rigidity of one beam',
          formula: 'E · I',
          values: [
            { symbol: 'E', is: 'elastic modulus', quantity: elastic, from: origin() },
            { symbol: 'I', is: 'second moment of area of one beam', quantity: secondMoment, from: origin() },
          ],
          result: { symbol: 'EI', quantity: rigidity },
          source: 'strength of materials',
        },
        {
          what: 'Greatest sag',
          formula: 'D / EI',
          values: [
            { symbol: 'D', is: 'sag times EI, N·mm³', quantity: bent, from: 'line above' },
            { symbol: 'EI', is: 'flexural rigidity of one beam', quantity: rigidity, from: 'line above' },
          ],
          result: { symbol: 'delta', quantity: sag },
          source: 'strength of materials',
        },
        {
          what: 'Limit',
          formula: 'L / n',
          values: [{ symbol: 'L', is: 'span', quantity: lengthOf(span), from: input.spanFrom }, ruleValue(rules, 'deflectionDivisor', 'n')],
          result: { symbol: 'delta_most', quantity: limit },
          source: sourceOf(rules, 'deflectionDivisor'),
        },
        utilisationStep(
          { symbol: 'delta', is: 'greatest sag', quantity: sag, from: 'line above' },
          { symbol: 'delta_most', is: 'limit of the sag', quantity: limit, from: 'line above' },
          'rule set of the site',
        ),
      ];
    },
    notes: () => [
      input.fixity > 0
        ? say`With the known stiffness of the connectors.`
        : say`With pinned ends, which is the safe side: real connectors let the beam sag less.`,
      say`Deflection within the limit does not prove strength.`,
    ],
  });
}

/** Sagging or hogging, whichever is greater, N·mm. */
const greatestMoment = ({ answer }: LoadedBeam): number => Math.max(answer.sagging.moment, Math.abs(answer.hogging.moment));

function momentSteps(input: PairInput, worse: OneBeam): readonly WorkedStep[] {
  const { sagging, endMomentLeft, endMomentRight } = worse.beam.answer;
  if (sagging.moment >= greatestMoment(worse.beam)) return saggingSteps(input, worse);
  const end = endMomentLeft < endMomentRight ? 'left' : 'right';
  const moment = momentOf(Math.min(endMomentLeft, endMomentRight));
  return [
    {
      what: `Greatest bending moment, hogging at the ${end} end`,
      formula: '−M_end',
      values: [
        { symbol: 'M_end', is: `moment at the ${end} end`, quantity: moment, from: 'connector stiffness, by compatibility of rotations' },
      ],
      result: { symbol: 'M', quantity: momentOf(-moment.value) },
      source: 'statics',
    },
  ];
}

const worseBy = ({ front, rear }: PairInput, measure: (beam: LoadedBeam) => number): OneBeam =>
  measure(rear) > measure(front) ? { side: 'rear', beam: rear } : { side: 'front', beam: front };
