/** What a diagram says in one sentence, for those who do not see it, and the words round it. */
import { formatQuantity, formatValue, type Reading } from '../../src-core/units/format';
import { lengthOf } from '../../src-core/units/quantity';
import { valueOf, worstPeak, type BeamName, type Diagram, type DiagramName, type Limit, type Peak } from './diagram';

export const DIAGRAM_TITLES: Readonly<Record<DiagramName, string>> = {
  intensity: 'Intensity',
  shear: 'Shear',
  bending: 'Bending',
  deflection: 'Deflection',
};

export const BEAM_NAMES: Readonly<Record<BeamName, string>> = { pair: 'both beams together', front: 'front beam', rear: 'rear beam' };

/** "at 1 382 mm", "at the left support", or "between 1 200 mm and 1 500 mm" on a plateau. */
export function placeWords({ from, to }: Pick<Peak, 'from' | 'to'>, span: number, reading: Reading): string {
  if (to < 0.5) return 'at the left support';
  if (from > span - 0.5) return 'at the right support';
  if (to - from < 0.5) return `at ${formatQuantity(lengthOf(from), reading)}`;
  return `between ${formatQuantity(lengthOf(from), reading)} and ${formatQuantity(lengthOf(to), reading)}`;
}

export const peakFigure = (diagram: Diagram, peak: Peak, reading: Reading): string =>
  formatQuantity(valueOf(diagram.name, peak.value), reading);

/** The label at the peak: figure and place, without repeating the unit of length. */
export function peakLabel(diagram: Diagram, peak: Peak, reading: Reading): string {
  const beam = peak.beam === 'pair' ? '' : `${peak.beam} `;
  if (!diagram.measured) return `${beam}most ${placeWords(peak, diagram.plot.span, reading)}`;
  return `${beam}${peakFigure(diagram, peak, reading)} ${placeWords(peak, diagram.plot.span, reading)}`;
}

/** "rated even load 506 kg·m": what the rating, evenly spread, does to what is drawn. */
export function limitWords(limit: Limit, diagram: Diagram, reading: Reading, sagDivisor: number | null): string {
  const name = limit.kind === 'even load' ? 'rated even load' : `span/${sagDivisor ?? '?'}`;
  return diagram.measured ? `${name} ${formatQuantity(valueOf(diagram.name, limit.value), reading)}` : name;
}

/** "worst case 534 kg·m at 1 358 mm": of placement and mass, the dotted curve. */
export const worstCaseWords = (diagram: Diagram, worst: Peak, reading: Reading): string =>
  `worst case ${worst.beam === 'pair' ? '' : `${worst.beam} `}${peakFigure(diagram, worst, reading)} ${placeWords(worst, diagram.plot.span, reading)}`;

/** One sentence with the governing value and how it stands to its limits. */
export function diagramSentence(diagram: Diagram, reading: Reading, sagDivisor: number | null): string {
  const title = DIAGRAM_TITLES[diagram.name];
  const worst = worstPeak(diagram);
  if (worst === null) return `${title}: no load.`;
  if (!diagram.measured) {
    const even = diagram.limits.find((limit) => limit.kind === 'even load');
    const ratio =
      even && even.value > 0
        ? `, ${formatValue({ value: worst.value / even.value, kind: 'ratio' }, reading).number} times that under the rating evenly spread`
        : '';
    return `${title}, shape only because the beam’s section is not known: greatest ${placeWords(worst, diagram.plot.span, reading)} on the ${BEAM_NAMES[worst.beam]}${ratio}.`;
  }
  const of = worst.beam === 'pair' ? 'both beams together' : `the ${BEAM_NAMES[worst.beam]}`;
  const limits = diagram.limits.map(
    (limit) =>
      `${limit.exceeded ? 'beyond' : 'within'} ${limitWords(limit, diagram, reading, sagDivisor)}${limit.judged ? '' : ', for information'}`,
  );
  const shaken = diagram.worstCase === null ? '' : `; ${worstCaseWords(diagram, diagram.worstCase, reading)}`;
  const against = limits.length > 0 ? `; ${limits.join('; ')}` : '';
  return `${title} of ${of}: greatest ${peakFigure(diagram, worst, reading)} ${placeWords(worst, diagram.plot.span, reading)}${against}${shaken}.`;
}
