/** Worked calculation of a frame's storey, from the topmost level down to its foot. */
import { lengthOf, massOf } from '../units/quantity';
import type { WorkedStep, WorkedValue } from './finding';
import { RATED } from './frame-rating';
import { endFrontKg, endRearKg, frameMassAbove, type FrameBeamEnd } from './frame-loads';
import type { FrameStoreyInput, JudgedStorey } from './frame-storey';
import { utilisationStep } from './unit-load';
import { above, put } from './worked-values';

export function storeyWorked(input: FrameStoreyInput, storey: JudgedStorey): readonly WorkedStep[] {
  const post = storey.rearKg > storey.frontKg ? 'rear' : 'front';
  const goodsOf = (end: FrameBeamEnd) => (post === 'front' ? end.goodsFrontKg : end.goodsRearKg);
  const massOn = post === 'front' ? endFrontKg : endRearKg;
  const steps: WorkedStep[] = [];
  const parts: WorkedValue[] = [];
  input.levels.forEach((level, index) => {
    if (level.highest <= storey.from) return;
    const number = index + 1;
    const values: WorkedValue[] = level.ends.flatMap((end) => {
      const side = end.side === 'left' ? 'l' : 'r';
      return [
        put(`g${number}${side}`, `goods on ${end.name}, by the reaction of its ${post} beam`, massOf(goodsOf(end)), 'level check'),
        put(`b${number}${side}`, `half a beam of ${end.name}`, massOf(end.beamKg), 'beam type'),
        ...(end.deckKg > 0
          ? [put(`d${number}${side}`, `a quarter of the deck of ${end.name}`, massOf(end.deckKg), 'deck of the level')]
          : []),
      ];
    });
    const mass = massOf(level.ends.reduce((sum, end) => sum + massOn(end), 0));
    steps.unshift({
      what: `On the ${post} post from level ${number} of the frame`,
      formula: values.map(({ symbol }) => symbol).join(' + '),
      values,
      result: { symbol: `p${number}`, quantity: mass },
      source: 'statics: each beam end goes to its post',
    });
    parts.unshift(put(`p${number}`, `from level ${number}`, mass, 'line above'));
  });
  const own = frameMassAbove(input.massKg, input.height, storey.from) / 2;
  const onPost = post === 'front' ? storey.frontKg : storey.rearKg;
  return [
    ...steps,
    {
      what: 'Half of the frame above the foot of the storey',
      formula: 'm_f · (1 − h / H) / 2',
      values: [
        put('m_f', 'mass of the frame', massOf(input.massKg), input.massFrom),
        put('h', 'foot of the storey', lengthOf(storey.from), 'beam levels'),
        put('H', 'height of the frame', lengthOf(input.height), 'frame'),
      ],
      result: { symbol: 'p_f', quantity: massOf(own) },
      source: 'its mass is taken as even over its height',
    },
    {
      what: `On the ${post} post`,
      formula: `${parts.map(({ symbol }) => symbol).join(' + ')} + p_f`,
      values: [...parts, put('p_f', 'half of the frame', massOf(own), 'line above')],
      result: { symbol: 'p', quantity: massOf(onPost) },
      source: 'storey by storey from the top',
    },
    {
      what: 'As a frame with both posts alike',
      formula: '2 · p',
      values: [above('p', `on the ${post} post`, massOf(onPost))],
      result: { symbol: 'm', quantity: massOf(storey.demandKg) },
      source: 'a frame’s rating takes it that front and rear share alike',
    },
    ...storey.rating.steps,
    ...(storey.rating.kg === null
      ? []
      : [
          utilisationStep(
            put('m', 'mass on the frame', massOf(storey.demandKg), 'line above'),
            put(RATED, 'rating of the frame', massOf(storey.rating.kg), 'line above'),
            storey.rating.by,
          ),
        ]),
  ];
}
