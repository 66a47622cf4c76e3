/** What was found at a bay's frames and beams, as it is marked in its drawings: the class of its damage, and what stays bent. */
import { classOfDamage, MEMBER_WORDS, type DamageClass } from '../../src-core/checks/damage-class';
import { opening } from '../../src-core/checks/phrase';
import { resolveRules } from '../../src-core/checks/rule-sets';
import type { Bay, Frame, Id, Level, Run, Site } from '../../src-core/site/site';
import { formatQuantity, type Reading } from '../../src-core/units/format';
import { lengthOf } from '../../src-core/units/quantity';
import { DAMAGE_CLASS_WORDS } from '../../src-core/words/visit-words';

/** One find in words: "Front upright of frame A2", "Amber". */
export interface Found {
  readonly id: string;
  readonly part: string;
  /** Null for a set, which is measured and not classed. */
  readonly class: DamageClass | null;
  readonly word: string;
}

/** What is marked at one upright or level; a mark shows the worst class of several. */
export interface Marked {
  readonly class: DamageClass | null;
  /** A beam of it stays bent. */
  readonly set: boolean;
  readonly found: readonly Found[];
}

export interface BayMarks {
  readonly left: Marked;
  readonly right: Marked;
  readonly levels: ReadonlyMap<Id, Marked>;
  readonly all: readonly Found[];
}

/** The worst first; what is not classed counts as red until it is. */
const WORST: readonly DamageClass[] = ['red', 'unclassed', 'amber', 'green'];

const marked = (found: readonly Found[]): Marked => ({
  class: WORST.find((one) => found.some((other) => other.class === one)) ?? null,
  set: found.some((one) => one.class === null),
  found,
});

/** @param today ISO date, as amber damage turns red by its age */
export function bayMarks(site: Site, run: Run, bay: Bay, today: string, reading: Reading): BayMarks {
  const rules = resolveRules(site.rules);
  const index = run.bays.indexOf(bay);
  const upright = (frame: Frame | undefined): Marked =>
    marked(
      (frame?.damages ?? []).map((damage) => {
        const { class: of } = classOfDamage(damage, rules, today);
        const part = `${opening(MEMBER_WORDS[damage.member])} of frame ${frame?.name ?? ''}`;
        return { id: damage.id, part, class: of, word: DAMAGE_CLASS_WORDS[of].word };
      }),
    );
  const left = upright(run.frames[index]);
  const right = upright(run.frames[index + 1]);
  const levels = new Map(
    bay.levels.flatMap((level, i): [Id, Marked][] => {
      const found = [...damageOf(level, i + 1), ...setsOf(level, i + 1, reading)];
      return found.length === 0 ? [] : [[level.id, marked(found)]];
    }),
  );
  return { left, right, levels, all: [...left.found, ...right.found, ...[...levels.values()].reverse().flatMap((one) => one.found)] };
}

/** Damage of a beam is red in every rule set: no millimetres are published that would excuse it. */
const damageOf = ({ beamDamages }: Level, number: number): readonly Found[] =>
  beamDamages.map((damage) => ({
    id: damage.id,
    part: opening(`${damage.member === 'connector' ? 'connector of the ' : ''}${damage.beam} beam of level ${number}`),
    class: 'red',
    word: DAMAGE_CLASS_WORDS.red.word,
  }));

function setsOf({ id, sags }: Level, number: number, reading: Reading): readonly Found[] {
  const ways = (one: Level['sags'][number]) => [
    ...(one.unloadedMm !== null && one.unloadedMm > 0 ? [`${formatQuantity(lengthOf(one.unloadedMm), reading)} down`] : []),
    ...(one.sidewaysMm !== null && one.sidewaysMm > 0 ? [`${formatQuantity(lengthOf(one.sidewaysMm), reading)} sideways`] : []),
  ];
  return sags.flatMap((one): Found[] => {
    const bent = ways(one);
    if (bent.length === 0) return [];
    const part = `${opening(one.beam)} beam of level ${number}`;
    return [{ id: `${id} ${one.beam}`, part, class: null, word: `stays bent ${bent.join(', ')}` }];
  });
}
