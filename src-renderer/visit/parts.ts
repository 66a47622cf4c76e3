/** The parts of a bay that can be damaged, as one list to choose from. */
import type { BayPlace } from '../../src-core/site/lookup';
import { BEAM_MEMBERS, FRAME_MEMBERS, type SeenDamage } from '../../src-core/visit/visit';
import { BEAM_MEMBER_WORDS, FRAME_MEMBER_WORDS } from '../../src-core/words/visit-words';

export interface Part {
  readonly key: string;
  readonly name: string;
  /** The damage, moved to this part. */
  readonly move: (damage: SeenDamage) => SeenDamage;
}

const asFrame = (damage: SeenDamage) => (damage.on === 'frame' ? damage : { alongMm: null, acrossMm: null, gaugeMm: 1000 });

/** Left frame, right frame, then the beams from the top down. */
export function partsOf({ run, bay, index }: BayPlace): readonly Part[] {
  const frames = [
    { side: 'left', frame: run.frames[index] },
    { side: 'right', frame: run.frames[index + 1] },
  ].flatMap(({ side, frame }) =>
    frame === undefined
      ? []
      : FRAME_MEMBERS.map((member): Part => ({
          key: `${frame.id} ${member}`,
          name: `${FRAME_MEMBER_WORDS[member]} of the ${side} frame, ${frame.name}`,
          move: (damage) => {
            const { id, torn, note, found } = damage;
            const { alongMm, acrossMm, gaugeMm } = asFrame(damage);
            return { id, on: 'frame', frameId: frame.id, member, alongMm, acrossMm, gaugeMm, torn, note, found };
          },
        })),
  );
  const beams = bay.levels
    .flatMap((level, i) =>
      (['front', 'rear'] as const).flatMap((beam) =>
        BEAM_MEMBERS.map((member): Part => ({
          key: `${level.id} ${beam} ${member}`,
          name: `${BEAM_MEMBER_WORDS[member]}, level ${i + 1}, ${beam}`,
          // Nothing of a beam is judged by millimetres but its sag, which is measured apart.
          move: ({ id, note, found }) => ({ id, on: 'beam', levelId: level.id, beam, member, torn: true, note, found }),
        })),
      ),
    )
    .toReversed();
  return [...frames, ...beams];
}

export const partKey = (damage: SeenDamage): string =>
  damage.on === 'frame' ? `${damage.frameId} ${damage.member}` : `${damage.levelId} ${damage.beam} ${damage.member}`;

/** Under which the half-typed plumb reading of a frame is kept, for the visit and bay that it is typed in. */
export const halfPlumb = (frameId: string, of: string): string => `plumb:${frameId}:${of}`;

/** The part of that key that names the visit and its bay. */
export const bayOfVisit = (visitId: string, bayId: string): string => `${visitId}:${bayId}`;
