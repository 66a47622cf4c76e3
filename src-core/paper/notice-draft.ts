/**
 * A draft of the load notice of a bay, with what is still missing from it. It is a draft for the
 * competent person and no rating: every figure on it was entered, none was calculated.
 *
 * What a notice must show is put together from the UK's, the United States' and the German requirements:
 * facts M-30 with F-145 to F-151 (HSG76 §634, ANSI MH16.1 §1.4.2, DGUV Information 208-061, as restated).
 */
import { findBay } from '../site/lookup';
import type { Bay, Id, LoadNotice, Run, Site } from '../site/site';
import { dateWords } from '../units/dates';
import { forceOf, lengthOf, massOf } from '../units/quantity';
import { say, type Text } from '../units/text';
import { closingBlocks, paperOf, type PaperInput } from './context';
import { heading, list, paragraph, remark, table, type Paper } from './paper';

export interface NoticeItem {
  readonly item: string;
  /** What the notice says; null where it is missing. */
  readonly says: Text | null;
  /** How to get it. */
  readonly how: string;
}

const FROM_MAKER = 'Ask the supplier or maker for it in writing.';

/** Everything a notice must show, in its order on the notice. @param contact who is told of damage; empty = not named */
export function noticeItems(site: Site, bayId: Id, contact: string): readonly NoticeItem[] {
  const { run, bay } = findBay(site, bayId);
  const notice = site.notices.find(({ id }) => id === bay.noticeId) ?? null;
  const of = (item: string, says: Text | null, how: string = FROM_MAKER): NoticeItem => ({ item, says, how });
  const floor = site.floors.find(({ id }) => id === run.floorId);
  return [
    of('Rack', [`Run ${run.name}, bay ${bay.name}`]),
    of('Supplier or maker', named(notice?.maker)),
    of('Date of the rating', notice === null || notice.issued === '' ? null : [dateWords(notice.issued)]),
    of('Greatest unit load', mass(notice?.unitLoadKg)),
    of('Greatest load of a level, evenly spread on the pair of beams', levelLoads(notice, bay)),
    of('Unit loads a level is made for', notice === null || notice.unitLoadsPerLevel === null ? null : [String(notice.unitLoadsPerLevel)]),
    of('Greatest load of the bay', mass(notice?.bayKg)),
    of('Height of the first beam, at most', height(notice?.firstBeamMm)),
    of('Gap between beams, at most', height(notice?.greatestGapMm)),
    of('Number of beam levels', notice === null || notice.levels === null ? null : [String(notice.levels)]),
    of('Beam levels as they stand', pitches(bay), 'Measure them from the floor to the top of each beam.'),
    of('Report damage to', contact.trim() === '' ? null : [contact], 'Name who answers for the racks, under Rounds.'),
    ...(floor?.kind === 'suspended'
      ? [
          of(
            'Floor limit',
            floor.legN === null ? null : say`${forceOf(floor.legN)} a leg (${floor.name})`,
            'Ask the floor’s owner or a structural engineer.',
          ),
        ]
      : []),
    of('Edition of the notice', named(notice?.name), 'Give the notice a number and a date.'),
  ];
}

const named = (text: string | undefined): Text | null => (text === undefined || text.trim() === '' ? null : [text]);
const mass = (kg: number | null | undefined): Text | null => (kg === null || kg === undefined ? null : [massOf(kg)]);
const height = (mm: number | null | undefined): Text | null => (mm === null || mm === undefined ? null : [lengthOf(mm)]);

/** One figure where all levels have the same, else level by level. Null where one of them has none. */
function levelLoads(notice: LoadNotice | null, { levels }: Bay): Text | null {
  const stated = notice?.levelKg ?? [];
  const each = levels.map((_, i) => stated[Math.min(i, stated.length - 1)] ?? null);
  const [first] = each;
  if (first === undefined || each.some((kg) => kg === null)) return null;
  if (each.every((kg) => kg === first)) return mass(first);
  return each.flatMap((kg, i) => say`${i === 0 ? '' : '; '}level ${i + 1}: ${massOf(kg ?? 0)}`);
}

const pitches = ({ levels }: Bay): Text | null =>
  levels.length === 0 ? null : levels.flatMap(({ heightMm }, i) => say`${i === 0 ? '' : '; '}level ${i + 1}: ${lengthOf(heightMm)}`);

export function draftNotice(input: PaperInput, bayId: Id, contact: string): Paper {
  const { run, bay } = findBay(input.site, bayId);
  const items = noticeItems(input.site, bayId, contact);
  const missing = items.filter(({ says }) => says === null);
  return paperOf(input, [bay], {
    kind: 'draft-notice',
    title: 'Draft load notice',
    about: aboutBay(run, bay),
    blocks: [
      paragraph([
        'Draft for the competent person. It repeats what was entered and rates nothing: a notice is valid only once the supplier, the maker or a competent engineer has confirmed it.',
      ]),
      table(
        'What the notice says',
        ['Item', 'On the notice'],
        items.map(({ item, says }) => [[item], says ?? ['missing']]),
      ),
      ...list([
        ['Loads are safe working loads for goods evenly spread on the pair of beams.'],
        ['Do not alter the rack. A moved, added or removed beam makes this notice void.'],
        ['Do not climb on the rack. Do not load a level with a missing lock.'],
        ['Report every damage at once.'],
      ]),
      heading('Is it complete?'),
      missing.length === 0
        ? paragraph(['Everything that a notice must show is entered. Have it confirmed in writing.'])
        : table(
            `Missing: ${missing.length} of ${items.length}`,
            ['What is missing', 'How to get it'],
            missing.map(({ item, how }) => [[item], [how]]),
          ),
      remark([
        'What a notice must show is put together from HSG76 §634, ANSI MH16.1 §1.4.2 and DGUV Information 208-061, as restated by trade bodies. Goods of a special form need a configuration of their own on the notice: ask the supplier.',
      ]),
      ...closingBlocks(input, [bay]),
      { kind: 'sign-off', lines: [{ role: 'Confirmed by (supplier, maker or engineer)', signed: null }] },
    ],
  });
}

const aboutBay = (run: Run, bay: Bay): string => `Bay ${bay.name}, run ${run.name}`;
