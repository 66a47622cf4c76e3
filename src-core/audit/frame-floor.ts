/** The legs of a frame on the floor of its run, and those of the run behind it. */
import type { Finding, Missing } from '../checks/finding';
import { backToBackLegs, legLoad, platePressure, type FrameOnFloor, type Legs, type LegsBehind } from '../checks/floor';
import { distinctMissing } from '../checks/make-finding';
import type { Stated } from '../checks/unit-load';
import type { Floor } from '../site/site';
import { asked, type FrameWork, type SiteContext } from './context';
import { frameContents, legsFor, nameOfFrame as nameOf, type FrameContents } from './frame-ends';
import { frameTypesMissing } from './level-work';
import { sourceWords } from './source-words';

type FloorLimit = 'legN' | 'pressureNPerMm2' | 'legPairN' | 'thicknessMm';

export function floorFindings(context: SiteContext, work: FrameWork, contents: FrameContents, legs: Legs | null): readonly Finding[] {
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
