/** The checks of one beam level: joins what the site says with what each check asks. */
import { beamBending, beamDeflection, beamEndShear } from '../checks/beam-effects';
import { say, type Finding, type Missing } from '../checks/finding';
import { fullComplement, type FullComplement } from '../checks/full-complement';
import { levelRating, type LevelRating } from '../checks/level-rating';
import { levelTotal } from '../checks/level-total';
import { distinctMissing, finding, notAssessable } from '../checks/make-finding';
import { evenMasses, fixityOf, stiffnessFor, type LoadedBeam, type PairInput } from '../checks/pair';
import { inside } from '../checks/phrase';
import { placement, type Outline } from '../checks/placement';
import { sectionDeflection, sectionStress, type SectionNumber } from '../checks/section';
import { tipping } from '../checks/tipping';
import { positions, unitLoad, type Stated, type Weighed } from '../checks/unit-load';
import type { BeamType } from '../site/site';
import { solveBeam, type BeamAnswer } from '../statics/beam';
import { reduce } from '../statics/reduction';
import { beamConditionFindings } from './beam-condition';
import { asked, type BayWork, type LevelWork, type SiteContext, type StandingLoad } from './context';
import { frameTypesMissing } from './level-work';
import { looseGoods } from './loose-goods';
import { runnersFinding } from './runners';
import { sourceWords } from './source-words';
import type { LevelAudit, LevelEffects } from './types';
import { governingOf, verdictOfFindings } from './verdict';

export const levelName = (index: number): string => `Level ${index + 1}`;

/**
 * @param more findings of the level from other parts of the audit
 */
export function auditLevel(context: SiteContext, bay: BayWork, work: LevelWork, more: readonly Finding[]): LevelAudit {
  const rated = ratingOf(bay, work);
  const findings = [
    ...goodsFindings(context, bay, work, rated),
    ...beamFindings(context, bay, work, rated),
    ...beamConditionFindings(context, bay, work, rated),
    ...more,
  ];
  return {
    levelId: work.level.id,
    verdict: verdictOfFindings(findings),
    governing: governingOf(findings),
    totalKg: work.totalKg,
    span: work.span,
    effects: work.effects,
    ratedKg: rated.kg,
    findings,
  };
}

export const weighed = ({
  placement: { id },
  goods: { unitLoad: load, grossKg, from, missing },
  frontShare,
}: StandingLoad): Weighed & { readonly frontShare: number | null } => ({
  placementId: id,
  frontShare,
  name: load.name,
  massKg: grossKg,
  from,
  missing,
  percent: load.massUncertaintyPercent,
});

export const outline = (one: StandingLoad): Outline => ({
  placementId: one.placement.id,
  name: one.goods.unitLoad.name,
  from: one.fromMm,
  to: one.toMm,
  rear: one.rearMm,
  front: one.frontMm,
});

/** A number of the bay's notice, or how to get it. */
export function statedBy(bay: BayWork, field: 'unitLoadKg' | 'unitLoadsPerLevel' | 'bayKg', input: string, how: string): Stated {
  const { notice } = bay;
  if (notice === null) return { value: null, from: '', missing: [noticeMissing(bay)] };
  const value = notice[field];
  return {
    value,
    from: bay.noticeFrom,
    missing: value === null ? [{ input, how, field: `notice:${notice.id}:${field}` }] : [],
  };
}

export const noticeMissing = ({ bay }: BayWork): Missing => ({
  input: `load notice of bay ${bay.name}`,
  how: 'Read the notice at the rack and enter it. Where there is none, ask the maker for one for this rack as it stands.',
  field: `bay:${bay.id}:noticeId`,
});

function goodsFindings(context: SiteContext, bay: BayWork, work: LevelWork, rated: LevelRating): readonly Finding[] {
  const { place, goods, index } = work;
  const { rules } = context;
  const { closeAbove } = rules.value;
  const level = levelName(index);
  const loads = goods.map(weighed);
  const found: Finding[] = [];
  if (asked(context, 'placement')) found.push(...placement({ place, level, clearEntry: bay.bay.clearEntryMm, goods: goods.map(outline) }));
  if (asked(context, 'tipping'))
    found.push(
      ...tipping({
        place,
        goods: goods.map((one) => ({
          placementId: one.placement.id,
          name: one.goods.unitLoad.name,
          centre: one.centreMm,
          frontShare: one.frontShare,
        })),
        beamDistance: work.beamDistance,
        beamDistanceFrom: 'frame depth less the width of one beam',
        missing: frameMissing(bay),
        rules,
      }),
    );
  if (asked(context, 'unit-load')) {
    const limit = statedBy(bay, 'unitLoadKg', 'greatest unit load', 'Read it from the load notice, or ask the maker for it in writing.');
    found.push(...unitLoad({ place, goods: loads, limit, closeAbove }));
  }
  if (asked(context, 'positions')) found.push(positions({ place, level, count: goods.length, allowed: numberMadeFor(bay) }));
  if (asked(context, 'level-total'))
    found.push(
      levelTotal({
        place,
        level,
        goods: loads,
        rated,
        missingShare: frameMissing(bay),
        closeAbove,
      }),
    );
  return found;
}

const numberMadeFor = (bay: BayWork): Stated =>
  statedBy(
    bay,
    'unitLoadsPerLevel',
    'number of unit loads a level is made for',
    'Read it from the load notice or the drawing, or ask the maker.',
  );

const frameMissing = ({ frames, frameTypes }: BayWork): readonly Missing[] =>
  frameTypesMissing([
    { frame: frames[0], type: frameTypes[0] },
    { frame: frames[1], type: frameTypes[1] },
  ]);

export function ratingOf(bay: BayWork, { level, index, beamType }: LevelWork): LevelRating {
  const { notice } = bay;
  return levelRating({
    level: inside(levelName(index)),
    index,
    beamLength: bay.bay.clearEntryMm,
    notice: notice === null ? null : { id: notice.id, levelKg: notice.levelKg, from: bay.noticeFrom },
    beamType:
      beamType === null
        ? null
        : {
            id: beamType.id,
            name: beamType.name,
            ratings: beamType.ratings,
            from: `table of ${beamType.name}; ${sourceWords(beamType.source)}`,
          },
    nothingNamed: () => ({
      input: `rated capacity of ${inside(levelName(index))}`,
      how: 'Enter the bay’s load notice, or the level’s beam type with its maker’s table.',
      field: level.beamTypeId === null ? `bay:${bay.bay.id}:noticeId` : `level:${level.id}:beamTypeId`,
    }),
  });
}

const BEAM_CHECKS = ['beam-bending', 'beam-end-shear', 'beam-deflection', 'section-stress', 'section-deflection'] as const;

function beamFindings(context: SiteContext, bay: BayWork, work: LevelWork, rated: LevelRating): readonly Finding[] {
  const pair = work.effects === null || work.span === null ? null : pairInput(context, bay, work, work.effects, work.span, rated);
  const complement = asked(context, 'full-complement') ? complementOf(context, bay, work, rated, pair) : null;
  const counts = complement === null || !complement.judged;
  const section = sectionNumbers(work.beamType, work);
  const { beamType } = work;
  const from = () => (beamType === null ? '' : `data of ${beamType.name}; ${sourceWords(beamType.source)}`);
  const found: Finding[] = [];
  for (const check of BEAM_CHECKS) {
    if (!asked(context, check)) continue;
    found.push(pair === null ? withoutEffects(check, work, rated, section) : beamCheck(check, pair, work, counts, section, from));
  }
  if (complement !== null) found.push(complement.finding);
  if (pair !== null && asked(context, 'pallet-bearing')) {
    const onRunners = runnersFinding(work, pair, (effects) => pairInput(context, bay, work, effects, pair.span, rated), counts);
    if (onRunners !== null) found.push(onRunners);
  }
  return found;
}

type Section = ReturnType<typeof sectionNumbers>;

function beamCheck(
  check: (typeof BEAM_CHECKS)[number],
  pair: PairInput,
  { beamType }: LevelWork,
  counts: boolean,
  section: Section,
  from: () => string,
): Finding {
  switch (check) {
    case 'beam-bending':
      return beamBending(pair, counts);
    case 'beam-end-shear':
      return beamEndShear(pair, { kg: beamType?.endKg ?? null, from }, counts);
    case 'beam-deflection':
      return beamDeflection(pair, counts);
    case 'section-stress':
      return sectionStress(pair, section.sectionModulusMm3, section.designStressNPerMm2, from);
    case 'section-deflection':
      return sectionDeflection(pair, section.secondMomentMm4, section.elasticModulusNPerMm2, from);
  }
}

/** What a beam check says where its beams could not be solved. */
function withoutEffects(check: (typeof BEAM_CHECKS)[number], work: LevelWork, rated: LevelRating, section: Section): Finding {
  const numbers =
    check === 'section-stress'
      ? [section.sectionModulusMm3, section.designStressNPerMm2]
      : check === 'section-deflection'
        ? [section.secondMomentMm4, section.elasticModulusNPerMm2]
        : [];
  const counts = numbers.length === 0 || numbers.some(({ value }) => value !== null);
  if (work.missing.length === 0) {
    return finding({
      check,
      place: work.place,
      verdict: 'not-possible',
      counts,
      says: () => say`Not worked out: goods on ${inside(levelName(work.index))} cannot stand as they were entered.`,
    });
  }
  const ownMissing = numbers.length === 0 ? rated.missing : numbers.flatMap(({ value, missing }) => (value === null ? [missing()] : []));
  return notAssessable(check, work.place, distinctMissing([...work.missing, ...ownMissing]), { counts });
}

function sectionNumbers(type: BeamType | null, { level, index }: LevelWork) {
  const number = (
    field: 'sectionModulusMm3' | 'designStressNPerMm2' | 'secondMomentMm4' | 'elasticModulusNPerMm2',
    what: string,
  ): SectionNumber => ({
    value: type === null ? null : type[field],
    missing: () =>
      type === null
        ? {
            input: `beam type of ${inside(levelName(index))}`,
            how: 'Choose the beam type, or add it with its maker’s data.',
            field: `level:${level.id}:beamTypeId`,
          }
        : {
            input: `${what} of ${type.name}`,
            how: 'Ask the maker, or take it from the data sheet.',
            field: `beamType:${type.id}:${field}`,
          },
  });
  return {
    sectionModulusMm3: number('sectionModulusMm3', 'section modulus'),
    designStressNPerMm2: number('designStressNPerMm2', 'design stress'),
    secondMomentMm4: number('secondMomentMm4', 'second moment of area'),
    elasticModulusNPerMm2: number('elasticModulusNPerMm2', 'elastic modulus'),
  };
}

function pairInput(
  context: SiteContext,
  bay: BayWork,
  work: LevelWork,
  effects: LevelEffects,
  span: number,
  rated: LevelRating,
): PairInput {
  const { loads, rigidity, rigidityKnown, end } = effects;
  const fixity = end.kind === 'sprung' ? fixityOf(end.stiffness, rigidity, span) : 0;
  const beam = (load: LoadedBeam['load'], answer: BeamAnswer): LoadedBeam => ({ load, answer, even: evenMasses(answer, rigidity, fixity) });
  const front = beam(loads.front, effects.front);
  const alike = effects.rear === effects.front;
  return {
    place: work.place,
    level: levelName(work.index),
    span,
    spanFrom:
      context.site.rules.span === 'clear-entry'
        ? `clear entry of bay ${bay.bay.name}`
        : `upright centre to upright centre of bay ${bay.bay.name}`,
    goods: () =>
      work.goods.map((one) => ({
        ...weighed(one),
        massKg: one.goods.grossKg ?? 0,
        frontShare: one.frontShare ?? 0.5,
        centre: (work.offset ?? 0) + centreOf(one),
      })),
    totalKg: work.totalKg ?? 0,
    front,
    rear: alike ? front : beam(loads.rear, effects.rear),
    rigidity,
    rigidityKnown,
    fixity,
    fixityFrom: `connector stiffness of ${work.beamType?.name ?? 'the beam'} and its EI`,
    stiffer:
      fixity > 0
        ? null
        : once(() => {
            const stiffness = stiffnessFor(context.rules.value.likelyFixity, rigidity, span);
            const sprung = { span, rigidity, left: { kind: 'sprung', stiffness }, right: { kind: 'sprung', stiffness } } as const;
            const solve = (load: LoadedBeam['load']) => evenMasses(solveBeam(sprung, load), rigidity, context.rules.value.likelyFixity);
            const stiffFront = solve(loads.front);
            return { front: stiffFront, rear: alike ? stiffFront : solve(loads.rear) };
          }),
    loose: looseGoods(context, bay, work, effects, span, fixity),
    rated,
    rules: context.rules,
  };
}

/** Centre of mass along the bay, mm from the left upright's face. */
function centreOf({ placement: { mirrored }, goods: { pieces, unitLoad: load }, fromMm }: StandingLoad): number {
  const centre = (pieces === null ? null : reduce(pieces).centroid) ?? load.widthMm / 2;
  return fromMm + (mirrored ? load.widthMm - centre : centre);
}

function once<T>(make: () => T): () => T {
  let made: { readonly value: T } | null = null;
  return () => (made ??= { value: make() }).value;
}

function complementOf(context: SiteContext, bay: BayWork, work: LevelWork, rated: LevelRating, pair: PairInput | null): FullComplement {
  return fullComplement({
    place: work.place,
    level: levelName(work.index),
    on: context.site.rules.fullComplement,
    number: numberMadeFor(bay),
    goods: work.goods.map((one) => ({
      name: one.goods.unitLoad.name,
      massKg: one.goods.grossKg ?? 0,
      from: one.goods.from,
      left: one.fromMm,
      width: one.goods.unitLoad.widthMm,
    })),
    clearEntry: bay.bay.clearEntryMm,
    even: pair === null ? null : worseOf(pair),
    rated,
    rules: context.rules,
  });
}

/** Each effect on the beam where it is greater. */
const worseOf = ({ front, rear }: PairInput) => ({
  total: Math.max(front.even.total, rear.even.total),
  bending: Math.max(front.even.bending, rear.even.bending),
  endShear: Math.max(front.even.endShear, rear.even.endShear),
  deflection: Math.max(front.even.deflection, rear.even.deflection),
});
