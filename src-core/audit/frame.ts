/** The checks of one upright frame with both its bays: storeys, balance, legs on the floor, height, plumb, damage. */
import { frameDamage } from '../checks/damage';
import type { Finding, Missing } from '../checks/finding';
import { frameImbalance } from '../checks/frame-imbalance';
import type { FrameBay } from '../checks/frame-rating';
import { frameStorey, type FrameStoreyAnswer } from '../checks/frame-storey';
import { anchorPull, heightToDepth, type Asked } from '../checks/height-to-depth';
import { plumb } from '../checks/plumb';
import { perhapsTied } from '../site/behind';
import type { Answer, FrameType } from '../site/site';
import { weightOf } from '../units/quantity';
import { asked, type BayWork, type FrameWork, type SiteContext } from './context';
import { baysOf, frameContents, goodsOn, legsFor, nameOfFrame as nameOf, type FrameContents } from './frame-ends';
import { floorFindings } from './frame-floor';
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
    impossible: contents.impossible || storey.finding.verdict === 'not-possible',
    utilisation: storey.utilisation,
    utilisationMissing: storey.finding.missing,
    rules: context.rules,
  });
}

function standingFindings(context: SiteContext, work: FrameWork, contents: FrameContents): readonly Finding[] {
  const { frame, type, place, run } = work;
  const { rules } = context;
  const top = contents.levels.at(-1)?.highest ?? null;
  const depthMissing = frameTypesMissing([{ frame, type: null }])[0] as Missing;
  const slender = { place, frame: nameOf(work), height: top, depth: type?.depthMm ?? null, depthMissing, rules };
  // Asked only where it is told: putting the run behind together is work.
  const behind = frame.damages.length > 0 && perhapsTied(run) ? work.behind() : [];
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
        unload: [...baysOf(work).map(({ bay }) => `bay ${bay.bay.name}`), ...behind.map((one) => `the bays at ${nameOf(one)} behind it`)],
        perhapsTied: behind[0] !== undefined && run.backToBack?.rowSpacers === 'unknown' ? `run ${behind[0].run.name}` : null,
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
