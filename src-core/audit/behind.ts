/** What stands behind a run: two runs back to back see each other mirrored, each from its own aisle. */
import type { BackOfGoods } from '../checks/clearance-across';
import type { Missing } from '../checks/finding';
import type { Bay, Run } from '../site/site';
import type { BayWork, SiteContext } from './context';
import { frameTypesMissing } from './level-work';

/**
 * Whether bays and frames of the two runs stand exactly behind each other, as row spacers tie them: as
 * many, and as wide in reverse order. Else how they stand to each other is not known.
 */
export const mirrored = (run: Run, behind: Run): boolean =>
  run.bays.length === behind.bays.length &&
  run.bays.every(({ clearEntryMm }, i) => Math.abs(clearEntryMm - (behind.bays[behind.bays.length - 1 - i] as Bay).clearEntryMm) < 1e-6);

/** Where the counterpart of bay or frame `index` stands in a list of the run behind that is as long. */
export const counterpart = (index: number, length: number): number => length - 1 - index;

export interface BehindBay {
  readonly run: Run;
  /** Free gap from frame to frame, mm. */
  readonly gap: number;
  readonly goods: readonly BackOfGoods[];
  /** Frame types behind whose depth is not known. */
  readonly missing: readonly Missing[];
}

/**
 * The goods that stand or may stand behind a bay; null where no run is behind. Where the two runs do not
 * mirror each other every bay of the one behind is taken, over the whole width: the safe side.
 */
export function goodsBehind(context: SiteContext, { run, index }: BayWork): BehindBay | null {
  const tie = run.backToBack;
  const behind = tie === null ? undefined : context.runs.get(tie.runId);
  if (tie === null || behind === undefined) return null;
  const exact = mirrored(run, behind);
  const indices = exact ? [counterpart(index, behind.bays.length)] : behind.bays.map((_, i) => i);
  const missing: Missing[] = [];
  const goods: BackOfGoods[] = [];
  for (const i of indices) {
    const bay = behind.bays[i] as Bay;
    const frames = behind.frames.slice(i, i + 2).map((frame) => ({
      frame,
      type: frame.typeId === null ? null : (context.frameTypes.get(frame.typeId) ?? null),
    }));
    const lacking = frameTypesMissing(frames);
    const depth = Math.min(...frames.map(({ type }) => type?.depthMm ?? Infinity));
    const back = backsOf(context, bay, lacking.length > 0 ? Infinity : depth, exact);
    if (back.length > 0) missing.push(...lacking);
    goods.push(...back);
  }
  return { run: behind, gap: tie.gapMm, goods, missing };
}

function backsOf(context: SiteContext, bay: Bay, depth: number, exact: boolean): readonly BackOfGoods[] {
  const stands = [...bay.levels.map(({ heightMm, placements }) => ({ heightMm, placements })), { heightMm: 0, placements: bay.onFloor }];
  return stands.flatMap(({ heightMm, placements }) =>
    placements.flatMap(({ id, unitLoadId, atMm, towardsFrontMm }) => {
      const load = context.unitLoads.get(unitLoadId);
      if (load === undefined) return [];
      return [
        {
          placementId: id,
          name: load.name,
          bottom: heightMm,
          top: heightMm + load.heightMm,
          from: exact ? bay.clearEntryMm - atMm - load.widthMm : -Infinity,
          to: exact ? bay.clearEntryMm - atMm : Infinity,
          past: pastFrame(load.depthMm, towardsFrontMm, depth, load.leanMm),
        },
      ];
    }),
  );
}

/** How far goods reach past the rear face of their frame; which way they lean across is not stated, so it counts. */
export const pastFrame = (depth: number, towardsFront: number, frameDepth: number, lean: number): number =>
  (depth - frameDepth) / 2 - towardsFront + Math.abs(lean);
