/**
 * A level's two beams under the worst arrangement of its unit loads: each put away off its mark along and
 * across the rack within the placement tolerance, and as much heavier as its mass may be.
 *
 * Across the rack every unit load goes towards the beam in question by the whole tolerance, which raises
 * that beam's share by tolerance / distance of the beams. Along it, as statics/worst-case.ts finds.
 * Source: facts M-22, common practice.
 */
import { solveBeam, type BeamEnd } from '../statics/beam';
import { worstMoment, worstReaction, worstSag, type Arrangement } from '../statics/worst-case';
import { arrangedLoad, type LooseBeam, type LooseLoad } from '../statics/worst-case-loads';
import type { BeamLoad } from '../statics/load';
import { massWeighing } from '../units/quantity';
import type { BeamSide } from './finding';
import { evenBendingFactor, evenDeflectionFactor, evenMasses, type Effect, type LoadedBeam } from './pair';

export interface LooseGoods {
  /** N on both beams together, x in mm from the unit load's own left edge as it stands. */
  readonly load: BeamLoad;
  readonly width: number;
  /** Left support to its left edge, mm. */
  readonly at: number;
  readonly frontShare: number;
  /** Its mass may be this many per cent more than stated. */
  readonly percent: number;
}

export interface LoosePairInput {
  readonly goods: readonly LooseGoods[];
  readonly span: number;
  /** EI of one beam, N·mm². */
  readonly rigidity: number;
  readonly end: BeamEnd;
  /** Fixity of both ends, 0 pinned. */
  readonly fixity: number;
  /** The uprights' faces, mm from the left support. */
  readonly from: number;
  readonly to: number;
  /** mm, along and across. */
  readonly tolerance: number;
  /** Between the two beams, mm; null = not known: then only along the beam. */
  readonly beamDistance: number | null;
}

/** What an effect comes to in the worst case, on the beam where it is greater. */
export interface WorstEffect {
  readonly side: BeamSide;
  /** The even mass on the pair that does the same to one beam. */
  readonly kg: number;
  readonly arrangement: Arrangement;
  /** End of the greater reaction, for the end shear. */
  readonly end: 'left' | 'right' | null;
  /** Each unit load's share on that beam. */
  readonly shares: readonly number[];
}

export interface LoosePair extends LoosePairInput {
  /** Never less than the worst case of an effect, kg on the pair, from its stated even masses and without solving. */
  readonly most: (effect: Effect, stated: { readonly front: LoadedBeam; readonly rear: LoadedBeam }) => number;
  readonly worst: (effect: Effect) => WorstEffect;
  /** Both beams in that arrangement: the worse one and what is left for the other. */
  readonly beams: (worst: WorstEffect) => { readonly front: LoadedBeam; readonly rear: LoadedBeam };
}

export function loosePair(input: LoosePairInput): LoosePair {
  const { goods, span, rigidity, end, fixity, tolerance } = input;
  const beam: LooseBeam = { span, rigidity, left: end, right: end, from: input.from, to: input.to, tolerance };
  // Most levels are asked for the bound alone.
  let sharesOf: Readonly<Record<BeamSide, readonly number[]>> | null = null;
  const shares = (side: BeamSide): readonly number[] =>
    (sharesOf ??= { front: goods.map((one) => shareOf(input, one, 'front')), rear: goods.map((one) => shareOf(input, one, 'rear')) })[side];
  const loads = (side: BeamSide): readonly LooseLoad[] =>
    goods.map(({ load, width, at, percent }, i) => ({ load, width, at, factor: (shares(side)[i] as number) * (1 + percent / 100) }));
  const alike = goods.every(({ frontShare }) => frontShare === 0.5);
  const on = (effect: Effect, side: BeamSide): WorstEffect => {
    const arrangement = arrange(effect, beam, loads(side));
    const kg = evenMass(effect, arrangement.amount, span, rigidity, fixity);
    return { side, kg, arrangement, end: arrangement.end, shares: shares(side) };
  };
  const rise = (side: BeamSide): number => {
    let most = 1;
    for (const one of goods) most = Math.max(most, riseOf(one, side, shareOf(input, one, side)));
    return most;
  };
  let rises: Readonly<Record<BeamSide, number>> | null = null;
  const known = new Map<Effect, WorstEffect>();
  return {
    ...input,
    most: (effect, stated) => {
      // Held ends bend the influence lines, and the bound below with them.
      if (fixity > 0) return Infinity;
      rises ??= { front: rise('front'), rear: alike ? 1 : rise('rear') };
      const steepest = (STEEPEST[effect] * tolerance) / span;
      const front = boundOf(rises.front, stated.front.even[effect] + steepest * stated.front.even.total);
      return alike ? front : Math.max(front, boundOf(rises.rear, stated.rear.even[effect] + steepest * stated.rear.even.total));
    },
    worst: (effect) => {
      const found = known.get(effect) ?? worse(on(effect, 'front'), alike ? null : on(effect, 'rear'));
      known.set(effect, found);
      return found;
    },
    beams: ({ side, arrangement }) => {
      const solved = (which: BeamSide): LoadedBeam => {
        const factors = loads(side).map((one, i) => {
          const own = shares(side)[i] as number;
          return which === side ? one : { ...one, factor: (1 - own) * (1 + (goods[i] as LooseGoods).percent / 100) };
        });
        const load = arrangedLoad(factors, arrangement.shifts, span);
        const answer = solveBeam(beam, load);
        return { load, answer, even: evenMasses(answer, rigidity, fixity) };
      };
      return { front: solved('front'), rear: solved('rear') };
    },
  };
}

/**
 * How steep an effect's influence line can be, as even mass: moving all of the total by s raises the even
 * mass by at most this times s/L of it. Bending 8·1, end shear 2·1, deflection 384/5 · 1/(9√3), the
 * steepest end slope of a pinned beam under a point load.
 */
const STEEPEST: Readonly<Record<Effect, number>> = { bending: 8, endShear: 2, deflection: 384 / 45 / Math.sqrt(3) };

/** Goods that put nothing on a beam as stated have no part in what is known of it: then there is no bound. */
const boundOf = (rise: number, kg: number): number => (rise === Infinity ? Infinity : rise * kg);

function shareOf({ tolerance, beamDistance }: LoosePairInput, { frontShare }: LooseGoods, side: BeamSide): number {
  const stated = side === 'front' ? frontShare : 1 - frontShare;
  // Further out it would tip off, which is another check's to say.
  return beamDistance === null ? stated : Math.min(Math.max(stated, 0) + tolerance / beamDistance, Math.max(stated, 1));
}

/** How many times as much a unit load may put on this beam as stated. */
function riseOf({ frontShare, percent }: LooseGoods, side: BeamSide, share: number): number {
  const stated = side === 'front' ? frontShare : 1 - frontShare;
  const more = 1 + percent / 100;
  return stated > 0 ? (more * share) / stated : share > 0 ? Infinity : more;
}

function arrange(
  effect: Effect,
  beam: LooseBeam,
  loads: readonly LooseLoad[],
): Arrangement & { readonly amount: number; readonly end: 'left' | 'right' | null } {
  switch (effect) {
    case 'bending': {
      const { moment, ...arrangement } = worstMoment(beam, loads);
      return { ...arrangement, amount: moment, end: null };
    }
    case 'deflection': {
      const { sag, ...arrangement } = worstSag(beam, loads);
      return { ...arrangement, amount: sag, end: null };
    }
    case 'endShear': {
      const left = worstReaction(beam, loads, 'left');
      const right = worstReaction(beam, loads, 'right');
      const { force, ...arrangement } = right.force > left.force ? right : left;
      return { ...arrangement, amount: force };
    }
  }
}

/** As `evenMasses`, for one effect. */
function evenMass(effect: Effect, amount: number, span: number, rigidity: number, fixity: number): number {
  switch (effect) {
    case 'bending':
      return massWeighing((16 * amount) / span) / evenBendingFactor(fixity);
    case 'endShear':
      return massWeighing(4 * amount);
    case 'deflection':
      return massWeighing(((768 / 5) * (rigidity * amount)) / span / span / span) / evenDeflectionFactor(fixity);
  }
}

const worse = (front: WorstEffect, rear: WorstEffect | null): WorstEffect => (rear !== null && rear.kg > front.kg ? rear : front);
