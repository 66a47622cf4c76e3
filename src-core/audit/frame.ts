/** The checks of one upright frame with both its bays: storeys, balance, legs on the floor, height, plumb, damage. */
import { frameDamage } from '../checks/damage';
import type { Finding, Missing } from '../checks/finding';
import { backToBackLegs, legLoad, platePressure, type FrameOnFloor, type Legs, type LegsBehind } from '../checks/floor';
import { frameImbalance } from '../checks/frame-imbalance';
import { legsOf } from '../checks/frame-loads';
import type { FrameBay } from '../checks/frame-rating';
import { frameStorey, type FrameStoreyAnswer } from '../checks/frame-storey';
import { distinctMissing } from '../checks/make-finding';
import { anchorPull, heightToDepth, type Asked } from '../checks/height-to-depth';
import { plumb } from '../checks/plumb';
import type { Stated } from '../checks/unit-load';
import type { Answer, Floor, FrameType } from '../site/site';
import { weightOf } from '../units/quantity';
import { asked, type BayWork, type FrameWork, type SiteContext } from './context';
import { baysOf, frameContents, goodsOn, type FrameContents } from './frame-ends';
import { frameTypesMissing } from './level-work';
import { sourceWords } from './source-words';
import type { FrameAudit } from './types';
import { governingOf, verdictOfFindings } from './verdict';

export function frameAudit(context: SiteContext, work: FrameWork): FrameAudit {
  const contents = frameContents(context, work);
  const storey = storeyAnswer(context, work, contents);
  const legs = legsFor(contents);
  const findings: readonly Finding[] = [
    ...(asked(context, 'frame-storey') ? [storey.finding] : []),
    ...(asked(context, 'frame-imbalance') ? [imbalance(context, work, contents, storey)] : []),
    ...floorFindings(context, work, contents, legs),
    ...standingFindings(context, work, contents),
  ];
  return {
    frameId: work.frame.id,
    verdict: verdictOfFindings(findings),
    governing: governingOf(findings),
    storeys: storey.storeys.map(({ from, to, frontKg, rearKg, rating }) => ({
      fromMm: from,
      toMm: to,
      frontKg: legs === null ? null : frontKg,
      rearKg: legs === null ? null : rearKg,
      totalKg: legs === null ? null : frontKg + rearKg,
      ratedKg: rating.kg,
    })),
    legFrontN: legs === null ? null : weightOf(legs.frontKg),
    legRearN: legs === null ? null : weightOf(legs.rearKg),
    findings,
  };
}

const nameOf = ({ frame }: FrameWork): string => `frame ${frame.name}`;

const legsFor = ({ levels, massKg, missing, impossible }: FrameContents): Legs | null =>
  missing.length > 0 || impossible ? null : legsOf(levels, massKg);

function storeyAnswer(context: SiteContext, work: FrameWork, contents: FrameContents): FrameStoreyAnswer {
  const { type, frame, place } = work;
  return frameStorey({
    place,
    frame: nameOf(work),
    bays: baysOf(work).map(({ side, bay }) => frameBay(bay, side)),
    table:
      type === null
        ? null
        : {
            rows: type.table,
            by: type.tableBy,
            from: `table of ${type.name}; ${sourceWords(type.source)}`,
            field: `frameType:${type.id}:table`,
          },
    choice: context.site.rules.frameTable,
    levels: contents.levels,
    massKg: contents.massKg,
    massFrom: type === null ? '' : `frame type ${type.name}`,
    height: frame.heightMm,
    missing: contents.missing,
    impossible: contents.impossible,
    rules: context.rules,
  });
}

function frameBay({ bay, levels, notice, noticeFrom }: BayWork, side: FrameBay['side']): FrameBay {
  const heights = levels.map(({ level }) => level.heightMm);
  const gaps = heights.slice(1).map((height, i) => height - (heights[i] as number));
  const [first] = levels;
  return {
    name: `bay ${bay.name}`,
    side,
    firstBeam: heights[0] ?? null,
    greatestGap: gaps.length === 0 ? null : Math.max(...gaps),
    notice:
      notice === null
        ? null
        : {
            from: noticeFrom,
            frameKg: notice.frameKg,
            firstBeam: notice.firstBeamMm,
            greatestGap: notice.greatestGapMm,
            field: `notice:${notice.id}:`,
          },
    field: `bay:${bay.id}:`,
    firstBeamField: first === undefined ? `bay:${bay.id}:levels` : `level:${first.level.id}:heightMm`,
  };
}

function imbalance(context: SiteContext, work: FrameWork, contents: FrameContents, storey: FrameStoreyAnswer): Finding {
  const { left, right, place } = work;
  const side = (bay: BayWork | null, which: 'left' | 'right') =>
    bay === null ? null : { bay: `bay ${bay.bay.name}`, kg: goodsOn(contents, which) };
  return frameImbalance({
    place,
    frame: nameOf(work),
    left: side(left, 'left'),
    right: side(right, 'right'),
    missing: contents.goodsMissing,
    impossible: contents.impossible,
    utilisation: storey.utilisation,
    utilisationMissing: storey.finding.missing,
    rules: context.rules,
  });
}

type FloorLimit = 'legN' | 'pressureNPerMm2' | 'legPairN' | 'thicknessMm';

function floorFindings(context: SiteContext, work: FrameWork, contents: FrameContents, legs: Legs | null): readonly Finding[] {
  const { run, place } = work;
  const floor = run.floorId === null ? null : (context.floors.get(run.floorId) ?? null);
  const on: FrameOnFloor = {
    place,
    frame: nameOf(work),
    legs,
    missing: contents.missing,
    rules: context.rules,
  };
  const limit = (field: FloorLimit, input: string): Stated => floorStated(run, floor, field, input);
  return [
    ...(asked(context, 'leg-load') ? [legLoad(on, limit('legN', 'force allowed under one leg'))] : []),
    ...(asked(context, 'plate-pressure')
      ? [
          platePressure(
            on,
            { width: plateSide(work, 'plateWidthMm'), depth: plateSide(work, 'plateDepthMm') },
            limit('pressureNPerMm2', 'pressure allowed on the floor'),
          ),
        ]
      : []),
    ...(asked(context, 'back-to-back-legs')
      ? [
          backToBackLegs(
            on,
            behindOf(context, work),
            limit('legPairN', 'force allowed under two legs back to back'),
            limit('thicknessMm', 'thickness of the slab'),
          ),
        ]
      : []),
  ];
}

export function floorStated(run: FrameWork['run'], floor: Floor | null, field: FloorLimit | 'areaNPerMm2', input: string): Stated {
  if (floor === null)
    return {
      value: null,
      from: '',
      missing: [
        {
          input: `floor of run ${run.name}`,
          how: 'Add the floor with what its owner or an engineer allows on it, and choose it for the run.',
          field: `run:${run.id}:floorId`,
        },
      ],
    };
  const value = floor[field];
  return {
    value,
    from: `floor ${floor.name}; ${sourceWords(floor.source)}`,
    missing:
      value === null
        ? [
            {
              input: `${input} on floor ${floor.name}`,
              how: 'Ask the floor’s owner or an engineer for it in writing. It is never calculated here. Where they state it otherwise, leave this check out with that as the reason.',
              field: `floor:${floor.id}:${field}`,
            },
          ]
        : [],
  };
}

function plateSide({ type, frame }: FrameWork, field: 'plateWidthMm' | 'plateDepthMm'): Stated {
  if (type === null) return { value: null, from: '', missing: frameTypesMissing([{ frame, type }]) };
  const way = field === 'plateWidthMm' ? 'along' : 'across';
  return {
    value: type[field],
    from: `frame type ${type.name}`,
    missing:
      type[field] === null
        ? [
            {
              input: `base plate of ${type.name} ${way} the run`,
              how: 'Measure the base plate.',
              field: `frameType:${type.id}:${field}`,
            },
          ]
        : [],
  };
}

/** The rear leg behind; where the two runs do not mirror each other, the heaviest of that run. */
function behindOf(context: SiteContext, { run, behind }: FrameWork): LegsBehind | null {
  const frames = behind();
  if (run.backToBack === null || frames.length === 0) return null;
  const gap = run.backToBack.gapMm;
  const missing: Missing[] = [];
  let heaviest: { readonly name: string; readonly rearKg: number } | null = null;
  let known = true;
  for (const one of frames) {
    const contents = frameContents(context, one);
    const legs = legsFor(contents);
    missing.push(...contents.missing);
    if (legs === null) known = false;
    else if (heaviest === null || legs.rearKg > heaviest.rearKg)
      heaviest = { name: `${nameOf(one)} of run ${one.run.name}`, rearKg: legs.rearKg };
  }
  const name = heaviest?.name ?? `${nameOf(frames[0] as FrameWork)} of run ${(frames[0] as FrameWork).run.name}`;
  return { name, rearKg: known ? (heaviest?.rearKg ?? null) : null, missing: distinctMissing(missing), gap };
}

function standingFindings(context: SiteContext, work: FrameWork, contents: FrameContents): readonly Finding[] {
  const { frame, type, place, run } = work;
  const { rules } = context;
  const top = contents.levels.at(-1)?.highest ?? null;
  const depthMissing = frameTypesMissing([{ frame, type: null }])[0] as Missing;
  const slender = { place, frame: nameOf(work), height: top, depth: type?.depthMm ?? null, depthMissing, rules };
  const found: Finding[] = [];
  if (asked(context, 'height-to-depth'))
    found.push(
      heightToDepth({
        ...slender,
        anchored: answered(
          frame.anchored,
          `floor anchors of frame ${frame.name}`,
          'Look at both base plates for their anchors, and answer.',
          `frame:${frame.id}:anchored`,
        ),
        restrained: answered(
          frame.restrained,
          `whether frame ${frame.name} is held at the top`,
          'Look whether it is tied overhead or to the building, and answer.',
          `frame:${frame.id}:restrained`,
        ),
        behind: tiedBehind(work),
      }),
    );
  if (asked(context, 'anchor-pull'))
    found.push(
      anchorPull({
        ...slender,
        emptyKg: emptyMass(contents),
        missing: contents.ownMissing,
      }),
    );
  if (asked(context, 'plumb'))
    found.push(
      plumb({
        place,
        frame: nameOf(work),
        survey: frame.plumb,
        missing: {
          input: `plumb survey of frame ${frame.name}`,
          how: 'Hang a plumb line or use a laser from the topmost beams, and measure the offset along and across the run at the floor.',
          field: `frame:${frame.id}:plumb`,
        },
        rules,
      }),
    );
  if (asked(context, 'damage'))
    found.push(
      ...frameDamage({
        place,
        frame: nameOf(work),
        unload: [
          ...baysOf(work).map(({ bay }) => `bay ${bay.bay.name}`),
          ...(run.backToBack?.rowSpacers === 'yes' ? work.behind().map((one) => `the bays at ${nameOf(one)} behind it`) : []),
        ],
        damages: frame.damages,
        twoAmbersMakeRed: context.site.rules.twoAmbersMakeRed,
        rules,
        today: context.today,
      }),
    );
  return found;
}

const answered = (answer: Answer, input: string, how: string, field: string): Asked => ({ answer, missing: { input, how, field } });

function tiedBehind({ run, behind }: FrameWork): Parameters<typeof heightToDepth>[0]['behind'] {
  const frames = behind();
  const [first] = frames;
  if (run.backToBack === null || first === undefined) return null;
  const types = frames.map(({ type }) => type).filter((type): type is FrameType => type !== null);
  return {
    run: first.run.name,
    depth: types.length < frames.length ? null : Math.min(...types.map(({ depthMm }) => depthMm)),
    gap: run.backToBack.gapMm,
    spacers: answered(
      run.backToBack.rowSpacers,
      `row spacers between runs ${run.name} and ${first.run.name}`,
      'Look between the two runs for the links that tie their frames, and answer.',
      `run:${run.id}:backToBack.rowSpacers`,
    ),
  };
}

/** Frame, beams and decks without any goods, kg; null where one is not known. */
function emptyMass({ levels, massKg, ownMissing }: FrameContents): number | null {
  if (ownMissing.length > 0) return null;
  return levels.reduce((sum, { ends }) => ends.reduce((all, end) => all + 2 * (end.beamKg + end.deckKg), sum), massKg);
}
