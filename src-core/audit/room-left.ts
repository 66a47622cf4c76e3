/**
 * Room left: the heaviest unit load of a shape that can stand at its place with every check of its
 * level, its bay, both frames and the floor still met, up to the rating itself. "Close" is met: it is
 * within the rating with little to spare; over, not assessable and not possible are not.
 *
 * Masses are gross, pallet included. The unit load's own mass is not looked at, only its shape.
 */
import type { CheckName, Finding, Missing } from '../checks/finding';
import { distinctMissing } from '../checks/make-finding';
import { LIMITS } from '../site/limits';
import type { Id, Site } from '../site/site';
import { greatestMass, type Limit } from './greatest-mass';
import { failing, isOver, trialsOf, type SiteTrial, type Trials } from './trial-load';
import { compareFindings } from './verdict';

export type RoomLeft =
  | {
      readonly kind: 'room';
      /** kg, pallet included. */
      readonly mostKg: number;
      /** What stops it: the finding just above that mass. */
      readonly stop: Finding;
      /** The mass is reached as the level's designed full complement. */
      readonly asComplement: boolean;
      /** Lighter ones that would not do, because the level only then counts as its designed full complement; null where all do. */
      readonly notBetween: Gap | null;
    }
  /** Nothing may be added: something is over without these goods, or as soon as they weigh anything. */
  | { readonly kind: 'none'; readonly already: boolean; readonly because: Finding }
  /** It does not fit here, whatever it weighs; each finding says by how much. */
  | { readonly kind: 'no-fit'; readonly because: readonly Finding[] }
  | { readonly kind: 'not-assessable'; readonly missing: readonly Missing[]; readonly because: readonly Finding[] }
  /** No check that the site asks for depends on the mass. */
  | { readonly kind: 'unlimited' };

interface Gap {
  readonly aboveKg: number;
  readonly belowKg: number;
}

/** Checks of where and how goods stand, which no mass mends. */
const OF_STANDING: ReadonlySet<CheckName> = new Set<CheckName>([
  'placement',
  'tipping',
  'positions',
  'pallet-bearing',
  'goods-form',
  'clearance-along',
  'clearance-above',
  'clearance-across',
]);

/** Stands for "any mass at all", kg: too little to be seen in any figure. */
const LEAST_KG = 1e-6;

/**
 * For a unit load that stands on a level or on the floor of a bay.
 * @throws RangeError if the site has no such placement
 * Accuracy: 1e-12 of the mass, or of the check that limits it where that is more.
 */
export function roomLeft(site: Site, placementId: Id, today: string): RoomLeft {
  const steps = roomLeftInSteps(site, placementId, today);
  for (;;) {
    const { done, value } = steps.next();
    if (done) return value;
  }
}

/** The same audit by audit: after each, the rest may be done later or never. */
export function* roomLeftInSteps(site: Site, placementId: Id, today: string): Generator<undefined, RoomLeft> {
  const trials = trialsOf(site, placementId, today);
  const without = failing(trials.without);
  yield;
  const lightest = trials.evenly(trials.palletKg + LEAST_KG);
  yield;
  const failed = failing(lightest.findings);
  const unfit = notFitting(failed.filter((one) => !without.some(sameAs(one))));
  if (unfit.length > 0) return { kind: 'no-fit', because: unfit };

  let limit: Limit<SiteTrial> | null = null;
  if (lightest.met) {
    limit = yield* greatestMass(trials.evenly, lightest, lightest.kg + trials.guessKg, LIMITS.massKg);
    if (limit === null) return { kind: 'unlimited' };
  }
  const complement = yield* asFullComplement(trials, limit?.met.kg ?? 0);
  if (complement !== null) return complement;
  return limit === null ? withoutRoom(without, failed, trials) : upTo(limit, false, null);
}

const upTo = (limit: Limit<SiteTrial>, asComplement: boolean, notBetween: Gap | null): RoomLeft => ({
  kind: 'room',
  mostKg: limit.met.kg,
  stop: worstOf(failing(limit.missed.findings)),
  asComplement,
  notBetween,
});

/** Of what these goods bring with them: how they stand, else whatever is not possible because of it. */
function notFitting(brought: readonly Finding[]): readonly Finding[] {
  const standing = brought.filter(
    ({ check, verdict, utilisation }) =>
      OF_STANDING.has(check) && verdict !== 'not-assessable' && (check !== 'pallet-bearing' || utilisation === null),
  );
  return standing.length > 0 ? standing : brought.filter(({ verdict }) => verdict === 'not-possible');
}

/** Why there is no room: what is over already, then what is not known, then what even the lightest goods bring over. */
function withoutRoom(without: readonly Finding[], lightest: readonly Finding[], { named }: Trials): RoomLeft {
  const already = without.filter(isOver);
  if (already.length > 0) return { kind: 'none', already: true, because: worstOf(already) };
  const unknown = lightest.filter(({ verdict }) => verdict === 'not-assessable');
  if (unknown.length > 0)
    return { kind: 'not-assessable', missing: distinctMissing(unknown.flatMap(({ missing }) => missing.map(named))), because: unknown };
  return { kind: 'none', already: false, because: worstOf(lightest) };
}

/**
 * Heavier than by the equivalent even loads, where the level is then its designed full complement. The
 * rule comes in at one mass and goes at another, so what lies between the two limits is told apart.
 * @param evenKg greatest mass by the equivalent even loads
 */
function* asFullComplement(trials: Trials, evenKg: number): Generator<undefined, RoomLeft | null> {
  const range = trials.complementRange;
  if (range === null || range.toKg <= evenKg) return null;
  const lowKg = Math.max(range.fromKg, evenKg * (1 + NEARLY), trials.palletKg);
  let unmetKg = lowKg;
  let lowest: SiteTrial | null = null;
  let highest: SiteTrial | null = null;
  for (const kg of [lowKg, (lowKg + range.toKg) / 2, range.toKg]) {
    const trial = trials.asJudged(kg);
    yield;
    if (trial.met) highest = trial;
    if (trial.met) lowest ??= trial;
    else if (lowest === null) unmetKg = kg;
  }
  if (lowest === null || highest === null) return null;
  const beyond = highest.kg < range.toKg ? range.toKg : range.toKg * (1 + NEARLY);
  const limit = yield* greatestMass(trials.asJudged, highest, beyond, LIMITS.massKg);
  if (limit === null) return null;
  const fromKg = lowest.kg > lowKg ? yield* leastMet(trials, unmetKg, lowest.kg) : lowest.kg;
  return upTo(limit, true, fromKg > evenKg * (1 + 2 * NEARLY) ? { aboveKg: evenKg, belowKg: fromKg } : null);
}

/** From where on the level counts as its full complement, where neither masses nor their spread say so but its even loads. */
function* leastMet(trials: Trials, unmetKg: number, metKg: number): Generator<undefined, number> {
  let [from, to] = [unmetKg, metKg];
  while (to - from > NEARLY * to) {
    const kg = (from + to) / 2;
    if (trials.asJudged(kg).met) to = kg;
    else from = kg;
    yield;
  }
  return to;
}

/** Two masses nearer than this, relatively, are one. */
const NEARLY = 1e-9;

const worstOf = (findings: readonly Finding[]): Finding => findings.reduce((worst, one) => (compareFindings(one, worst) < 0 ? one : worst));

const sameAs =
  (one: Finding) =>
  (other: Finding): boolean =>
    one.check === other.check &&
    one.verdict === other.verdict &&
    one.place.placementId === other.place.placementId &&
    one.place.levelId === other.place.levelId &&
    one.place.frameId === other.place.frameId;
