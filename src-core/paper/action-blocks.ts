/** Actions and the locations that they empty, numbered so that one list can name the other's lines. */
import type { Site } from '../site/site';
import { dateWords } from '../units/dates';
import { say, type Text } from '../units/text';
import { stillOpen, type OpenAction } from '../visit/actions';
import { offLoadList } from '../visit/off-load';
import { ACTION_WORDS } from '../words/visit-words';
import { counted } from './context';
import { dayCell, heading, kgCell, NONE, paragraph, table, unbroken, type Block, type Cell } from './paper';

/** @param first what stands first: who empties the rack needs the locations, everybody else what was found */
export function actionBlocks(site: Site, actions: readonly OpenAction[], first: 'actions' | 'locations' = 'actions'): readonly Block[] {
  const open = stillOpen(actions);
  const closed = actions.filter((one) => one.closed !== null);
  const found = open.length === 0 ? [paragraph(['Nothing is open.'])] : [openTable(open)];
  const locations = locationBlocks(site, open);
  return [
    heading('What to do'),
    ...(first === 'locations' ? [...locations, ...found] : [...found, ...locations]),
    ...(closed.length === 0
      ? []
      : [
          table(
            'Done',
            ['What', 'Done by', 'On', 'How'],
            closed.map(({ says, closed: by }) => [says, [by?.person ?? ''], dayCell(by?.date ?? ''), [by?.how ?? '']]),
          ),
        ]),
  ];
}

function openTable(open: readonly OpenAction[]): Block {
  return table(
    'Open actions, the most urgent first',
    ['#No.', 'Action', 'Class', 'What was found', 'Found', 'By'],
    open.map((action, i) => [
      [String(i + 1)],
      [ACTION_WORDS[action.kind]],
      action.class === null ? NONE : { damage: action.class },
      [...action.says, ...reductionWords(action)],
      foundCell(action),
      dueCell(action),
    ]),
  );
}

const foundCell = ({ found, age }: OpenAction): Cell =>
  age === null || age <= 0 ? dayCell(found) : [`${unbroken(dateWords(found))}, ${unbroken(`${counted(age, 'day')} ago`)}`];

function dueCell({ due, overdue, kind }: OpenAction): Cell {
  if (kind === 'unload' || kind === 'out-of-use' || kind === 'replace-lock') return [unbroken('at once')];
  if (due === null) return NONE;
  return overdue !== null && overdue > 0 ? [`${unbroken(dateWords(due))}, ${unbroken(`${counted(overdue, 'day')} late`)}`] : dayCell(due);
}

const reductionWords = ({ reductions }: OpenAction): Text =>
  reductions.flatMap(
    ({ reduction, holds }) =>
      say` Reduced load by ${reduction.engineer}, ${holds ? 'until' : 'ended'} ${dateWords(reduction.until)}: ${reduction.says}`,
  );

/** Every level to empty, with what stands there and by which actions. Nothing where none is to be emptied. */
function locationBlocks(site: Site, open: readonly OpenAction[]): readonly Block[] {
  const locations = offLoadList(site, open);
  if (locations.length === 0) return [];
  return [
    table(
      'Locations to unload or not to reload',
      ['Run', 'Bay', '#Level', 'What to do', 'Goods there now', '#Mass', 'By action', 'Done'],
      locations.map(({ runName, bayName, level, what, goods, goodsKg, because }) => [
        [runName],
        [bayName],
        [String(level)],
        [unbroken(what === 'unload' ? 'Unload, and bar it' : 'Do not reload')],
        goods === '' ? ['nothing'] : [goods],
        kgCell(goodsKg),
        [because.map((action) => open.indexOf(action) + 1).join(', ')],
        [''],
      ]),
    ),
  ];
}
