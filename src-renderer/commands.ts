/**
 * Every command as data: its name, its keys, when it is allowed, what it does. Keys, the menu and
 * the command list all read this one table, so that none of them can say something else.
 */
import { formatQuantity } from '../src-core/units/format';
import { lengthOf, type UnitSystem } from '../src-core/units/quantity';
import { changeBay, changeLevel, nudge } from './editing/goods-moves';
import { copyGoods, cutGoods, deleteGoods, duplicateGoods, mirrorGoods, pasteGoods, spaceEvenly } from './editing/goods-edits';
import { pressed, type KeyPress } from './keys';
import { copyLevelHere, pasteLevelHere } from './editing/level-clipboard';
import type { OpenSite } from './state/open-site.svelte';
import { allBays, framePlace } from './editing/places';
import {
  addBayAfter,
  addLevelOnTop,
  copyRun,
  duplicateBayHere,
  duplicateLevelHere,
  removeBayHere,
  removeLevelHere,
  removeRunFrom,
  shiftBay,
  shiftLevelHere,
  shiftRun,
  swapLevelHere,
} from './editing/rack-edits';
import type { Screen, Shell } from './state/shell.svelte';

export interface Surroundings {
  readonly shell: Shell;
  readonly open: OpenSite;
}

export const GROUPS = ['Site', 'Edit', 'Goods', 'Rack', 'Go to', 'View', 'Help'] as const;

export interface Command {
  readonly id: string;
  /** What it does, as it stands in the menu and the command list. */
  readonly name: string | ((at: Surroundings) => string);
  readonly group: (typeof GROUPS)[number];
  readonly keys: readonly string[];
  readonly when: (at: Surroundings) => boolean;
  readonly run: (at: Surroundings) => void;
}

type Allowed = (at: Surroundings) => boolean;

const always: Allowed = () => true;
const onRack: Allowed = ({ shell }) => shell.screen === 'rack';
const hasRun: Allowed = (at) => onRack(at) && at.open.run !== null;
const hasBay: Allowed = (at) => onRack(at) && at.open.bay !== null;
const hasLevel: Allowed = (at) => hasBay(at) && at.open.level !== null;
const carrying: Allowed = (at) => onRack(at) && at.open.carried !== null;
const hasGoods: Allowed = (at) => onRack(at) && at.open.selection.placementIds.length > 0;
const hasOne: Allowed = (at) => onRack(at) && at.open.selection.placementIds.length === 1;
const movable: Allowed = (at) => hasGoods(at) || carrying(at);
const still: Allowed = (at) => hasBay(at) && !carrying(at);
const stillOnLevel: Allowed = (at) => hasLevel(at) && !carrying(at);
const levelCopied: Allowed = (at) => hasBay(at) && at.open.copiedLevel !== null;

const command = (
  id: string,
  group: Command['group'],
  name: Command['name'],
  keys: readonly string[],
  when: Allowed,
  run: (at: Surroundings) => void,
): Command => ({ id, group, name, keys, when, run });

const screen = (id: Screen, name: string, keys: readonly string[] = []) =>
  command(
    `show-${id}`,
    'Go to',
    name,
    keys,
    ({ shell }) => shell.screen !== id,
    ({ shell }) => shell.show(id),
  );

/** Steps are round in the units of whoever looks: 10, 1 and 100 mm, or 0.5, 0.1 and 4 in. */
const NUDGES: readonly (readonly [prefix: string, step: Readonly<Record<UnitSystem, number>>])[] = [
  ['', { metric: 10, us: 12.7 }],
  ['Shift+', { metric: 1, us: 2.54 }],
  ['Alt+', { metric: 100, us: 101.6 }],
];

const nudges = (prefix: string, step: Readonly<Record<UnitSystem, number>>): readonly Command[] =>
  (['left', 'right'] as const).map((way) => {
    const by = ({ reading }: OpenSite) => step[reading.units];
    return command(
      `${way}-${step.metric}`,
      'Goods',
      ({ open }) => `Move ${way} by ${formatQuantity(lengthOf(by(open)), open.reading)}`,
      [`${prefix}Arrow${way === 'left' ? 'Left' : 'Right'}`],
      movable,
      ({ open }) => nudge(open, way === 'left' ? -by(open) : by(open)),
    );
  });

export const COMMANDS: readonly Command[] = [
  // ------------------------------------------------------------ site
  command('save', 'Site', 'Save', ['Mod+S'], always, ({ shell }) => void shell.save()),
  screen('history', 'Earlier states'),
  command('site-form', 'Site', 'Site name, units and place', [], always, ({ shell, open }) => {
    shell.show('rules');
    open.openTask('site', open.site.id);
  }),
  command('export', 'Site', 'Save a copy as a file…', [], always, ({ shell }) => void shell.exportFile()),
  command('export-package', 'Site', 'Export with visits and records…', [], always, ({ shell }) => void shell.packages.export()),
  command('leave', 'Site', 'All sites', [], always, ({ shell }) => shell.leave()),

  // ------------------------------------------------------------ edit
  command(
    'undo',
    'Edit',
    ({ open }) => (open.undoName === null ? 'Undo' : `Undo: ${open.undoName}`),
    ['Mod+Z'],
    ({ open }) => open.canUndo,
    ({ open }) => open.undo(),
  ),
  command(
    'redo',
    'Edit',
    ({ open }) => (open.redoName === null ? 'Redo' : `Redo: ${open.redoName}`),
    ['Mod+Shift+Z', 'Mod+Y'],
    ({ open }) => open.canRedo,
    ({ open }) => open.redo(),
  ),
  command('copy', 'Edit', 'Copy goods', ['Mod+C'], hasGoods, ({ open }) => copyGoods(open)),
  command('cut', 'Edit', 'Cut goods', ['Mod+X'], hasGoods, ({ open }) => cutGoods(open)),
  command(
    'paste',
    'Edit',
    'Paste goods on this level',
    ['Mod+V'],
    (at) => hasBay(at) && !levelCopied(at),
    ({ open }) => pasteGoods(open),
  ),
  command(
    'copy-level',
    'Edit',
    'Copy this level with its goods',
    ['Mod+C'],
    (at) => stillOnLevel(at) && !hasGoods(at),
    ({ open }) => copyLevelHere(open),
  ),
  command('paste-level', 'Edit', 'Paste the copied level into this bay', ['Mod+V'], levelCopied, ({ open }) => pasteLevelHere(open)),
  command('paste-level-to', 'Edit', 'Paste the copied level into several bays…', ['Mod+Shift+V'], levelCopied, ({ shell }) =>
    shell.ask({ kind: 'paste-level' }),
  ),
  command('duplicate', 'Edit', 'Duplicate goods', ['Mod+D'], hasGoods, ({ open }) => duplicateGoods(open)),
  command('delete', 'Edit', 'Take goods off', ['Delete', 'Backspace'], hasGoods, ({ open }) => deleteGoods(open)),
  command('select-all', 'Edit', 'Select all goods of this level', ['Mod+A'], hasBay, ({ open }) =>
    open.select({ placementIds: (open.level?.placements ?? open.bay?.onFloor ?? []).map((one) => one.id) }),
  ),

  // ------------------------------------------------------------ goods
  command('add-goods', 'Goods', 'Add goods…', ['Mod+G', 'Insert'], hasBay, ({ open }) => open.openTask('add-goods', open.bay?.id ?? '')),
  command(
    'pick-up',
    'Goods',
    'Pick up, to put down elsewhere',
    ['Enter', 'Space'],
    (at) => hasOne(at) && !carrying(at),
    ({ open }) => open.pickUp(open.selection.placementIds[0] ?? ''),
  ),
  command('put-down', 'Goods', 'Put down here', ['Enter', 'Space'], carrying, ({ open }) => open.putDown()),
  command('put-back', 'Goods', 'Put back', ['Escape'], carrying, ({ open }) => open.putBack()),
  command('move-to', 'Goods', 'Move to…', ['Mod+M'], hasGoods, ({ shell }) => shell.ask({ kind: 'move-to' })),
  ...NUDGES.flatMap(([prefix, step]) => nudges(prefix, step)),
  command('goods-up', 'Goods', 'Move to the level above', ['ArrowUp'], movable, ({ open }) => changeLevel(open, 1)),
  command('goods-down', 'Goods', 'Move to the level below', ['ArrowDown'], movable, ({ open }) => changeLevel(open, -1)),
  command('goods-bay-left', 'Goods', 'Move to the bay on the left', ['Shift+PageUp'], movable, ({ open }) => changeBay(open, -1)),
  command('goods-bay-right', 'Goods', 'Move to the bay on the right', ['Shift+PageDown'], movable, ({ open }) => changeBay(open, 1)),
  command('mirror', 'Goods', 'Turn left for right', ['M'], hasGoods, ({ open }) => mirrorGoods(open)),
  command('space-evenly', 'Goods', 'Space the level’s goods evenly', ['E'], hasLevel, ({ open }) => spaceEvenly(open)),
  command(
    'push-apart',
    'Goods',
    ({ open }) => (open.pushing ? 'Leave neighbours where they are when putting down' : 'Push neighbours apart when putting down'),
    [],
    onRack,
    ({ open }) => togglePushing(open),
  ),
  command(
    'unselect',
    'Goods',
    'Select nothing',
    ['Escape'],
    (at) => hasGoods(at) && !carrying(at),
    ({ open }) => open.select({ placementIds: [] }),
  ),

  // ------------------------------------------------------------ rack
  command('new-run', 'Rack', 'New run of bays…', [], always, ({ shell }) => shell.ask({ kind: 'new-run' })),
  command('add-bay', 'Rack', 'Add an empty bay to the right', [], hasBay, ({ open }) => addBayAfter(open)),
  command('add-bays', 'Rack', 'Add several bays, or by a template…', [], hasRun, ({ shell }) => shell.ask({ kind: 'add-bays' })),
  command('keep-template', 'Rack', 'Keep this bay as a template…', ['Mod+Shift+S'], hasBay, ({ shell }) =>
    shell.ask({ kind: 'keep-template' }),
  ),
  command('duplicate-bay', 'Rack', 'Duplicate this bay', ['Mod+Shift+D'], hasBay, ({ open }) => duplicateBayHere(open)),
  command('remove-bay', 'Rack', 'Delete this bay', [], hasBay, ({ open }) => removeBayHere(open)),
  command('bay-left', 'Rack', 'Move this bay left in its run', ['Mod+Shift+ArrowLeft'], still, (at) => moveBayHere(at, -1)),
  command('bay-right', 'Rack', 'Move this bay right in its run', ['Mod+Shift+ArrowRight'], still, (at) => moveBayHere(at, 1)),
  command('add-level', 'Rack', 'Add a level on top', [], hasBay, ({ open }) => addLevelOnTop(open)),
  command('duplicate-level', 'Rack', 'Duplicate this level on top', [], hasLevel, ({ open }) => duplicateLevelHere(open)),
  command('remove-level', 'Rack', 'Delete this level', [], hasLevel, ({ open }) => removeLevelHere(open)),
  command('raise-level', 'Rack', 'Raise this level by one hole', ['Alt+ArrowUp'], stillOnLevel, ({ open }) => shiftLevelHere(open, 1)),
  command('lower-level', 'Rack', 'Lower this level by one hole', ['Alt+ArrowDown'], stillOnLevel, ({ open }) => shiftLevelHere(open, -1)),
  command('swap-level-up', 'Rack', 'Swap this level with the one above', ['Mod+Shift+ArrowUp'], stillOnLevel, ({ open }) =>
    swapLevelHere(open, 1),
  ),
  command('swap-level-down', 'Rack', 'Swap this level with the one below', ['Mod+Shift+ArrowDown'], stillOnLevel, ({ open }) =>
    swapLevelHere(open, -1),
  ),
  command('fill-run', 'Rack', 'Give other bays this bay’s goods or levels…', [], hasBay, ({ shell }) => shell.ask({ kind: 'fill-run' })),
  command('bay-form', 'Rack', 'Bay: clear entry and notice', [], hasBay, ({ open }) => open.openTask('bay', open.bay?.id ?? '')),
  command('level-form', 'Rack', 'Level: height, beams, damage, locks and deck', [], hasLevel, ({ open }) =>
    open.openTask('level', open.level?.id ?? ''),
  ),
  command('left-frame', 'Rack', 'Frame left of this bay', [], hasBay, ({ open }) => openFrame(open, 0)),
  command('right-frame', 'Rack', 'Frame right of this bay', [], hasBay, ({ open }) => openFrame(open, 1)),
  command(
    'run-form',
    'Rack',
    'Run: floor, neighbours behind',
    [],
    ({ open }) => open.run !== null,
    ({ open }) => open.openTask('run', open.run?.id ?? ''),
  ),
  command('duplicate-run', 'Rack', 'Duplicate this run', [], hasRun, ({ open }) => open.run && copyRun(open, open.run)),
  command('run-up', 'Rack', 'Move this run up in the site', [], hasRun, ({ open }) => open.run && shiftRun(open, open.run, -1)),
  command('run-down', 'Rack', 'Move this run down in the site', [], hasRun, ({ open }) => open.run && shiftRun(open, open.run, 1)),
  command('remove-run', 'Rack', 'Delete this run', [], hasRun, ({ open }) => open.run && removeRunFrom(open, open.run)),

  // ------------------------------------------------------------ go to
  command('find', 'Go to', 'Find a bay or goods by name…', ['Mod+F'], always, ({ shell }) => shell.ask({ kind: 'find' })),
  command('next-bay', 'Go to', 'Next bay', ['PageDown'], hasBay, ({ open }) => walkBay(open, 1)),
  command('previous-bay', 'Go to', 'Previous bay', ['PageUp'], hasBay, ({ open }) => walkBay(open, -1)),
  command('level-up', 'Go to', 'Level above', ['Mod+ArrowUp'], still, ({ open }) => walkLevel(open, 1)),
  command('level-down', 'Go to', 'Level below', ['Mod+ArrowDown'], still, ({ open }) => walkLevel(open, -1)),
  command(
    'back',
    'Go to',
    'Back to where I was',
    ['Mod+B'],
    ({ open }) => open.canGoBack,
    ({ open, shell }) => {
      shell.show('rack');
      open.goBack();
    },
  ),
  screen('rack', 'Bay'),
  screen('run', 'Run elevation with frame loads'),
  screen('layout', 'Layout of runs and bays'),
  screen('libraries', 'Libraries: goods, notices, ratings', ['Mod+L']),
  command('templates', 'Go to', 'Bay templates', [], always, ({ shell, open }) => {
    shell.show('libraries');
    open.openTask('bayTemplate', '');
  }),
  screen('rules', 'Rules'),
  screen('visits', 'Visits: rounds, damage, open actions'),
  screen('records', 'Records: frozen checks and visits'),
  screen('paper', 'Paper: print and PDF…', ['Mod+P']),

  // ------------------------------------------------------------ view
  command(
    'units',
    'View',
    ({ open }) => (open.reading.units === 'metric' ? 'Show pounds and inches' : 'Show kilograms and millimetres'),
    ['Mod+U'],
    always,
    ({ open }) => open.switchUnits(),
  ),
  command('preferences', 'View', 'Preferences: colours, text, numbers…', ['Mod+,'], always, ({ shell }) =>
    shell.ask({ kind: 'preferences' }),
  ),
  command('commands', 'View', 'All commands', ['Mod+K'], always, ({ shell }) => shell.ask({ kind: 'commands' })),

  // ------------------------------------------------------------ help
  command('show-help', 'Help', 'Help, cautions and about', ['F1'], always, ({ shell }) => shell.show('help')),
];

function moveBayHere({ open }: Surroundings, by: 1 | -1): void {
  if (open.run && open.bay) shiftBay(open, open.run, open.bay, by);
}

function openFrame(open: OpenSite, side: 0 | 1): void {
  const { run, bay } = open;
  const frame = run && bay ? run.frames[run.bays.indexOf(bay) + side] : undefined;
  if (frame && framePlace(open.site, frame.id)) open.openTask('frame', frame.id);
}

function togglePushing(open: OpenSite): void {
  open.pushing = !open.pushing;
  open.say(
    open.pushing
      ? 'Goods that are put down now push their neighbours apart.'
      : 'Neighbours stay where they are now; goods are refused where they would stand in others.',
  );
}

/** Walks through the bays of all runs. */
function walkBay(open: OpenSite, by: 1 | -1): void {
  const bays = allBays(open.site);
  const here = bays.findIndex(({ bay }) => bay.id === open.selection.bayId);
  const next = bays[here + by];
  if (next === undefined) open.say(by > 0 ? 'This is the last bay of the site.' : 'This is the first bay of the site.');
  else {
    open.select({ runId: next.run.id, bayId: next.bay.id });
    open.sayWhere();
  }
}

function walkLevel(open: OpenSite, by: 1 | -1): void {
  const levels = open.bay?.levels ?? [];
  const here = levels.findIndex((level) => level.id === open.selection.levelId);
  if (here + by < -1 || here + by >= levels.length) return;
  open.select({ levelId: levels[here + by]?.id ?? null });
  open.sayWhere();
}

/** Letters, arrows, Enter and Space alone act only while the drawing has the focus, so that typing is never mistaken. */
export const isForDrawing = (chord: string): boolean => /^(Shift\+|Alt\+)*(\w|Arrow\w+|Enter|Space)$/.test(chord);

/** The command that a key press asks for here; null where it means nothing. */
export function commandFor(
  event: KeyPress,
  at: Surroundings,
  focus: { inField: boolean; inDrawing: boolean; textMarked?: boolean },
  mac: boolean,
): Command | null {
  for (const one of COMMANDS) {
    const chord = one.keys.find((key) => pressed(event, key, mac));
    if (chord === undefined || !one.when(at)) continue;
    if (isForDrawing(chord) && !focus.inDrawing) continue;
    // Text that is marked on the page is copied as text, unless goods are chosen.
    if (focus.textMarked && chord === 'Mod+C' && !hasGoods(at)) continue;
    if (focus.inField && KEPT_BY_FIELDS.includes(chord)) continue;
    return one;
  }
  return null;
}

/** Keys that belong to text while a field has the focus. */
const KEPT_BY_FIELDS: readonly string[] = [
  'Mod+Z',
  'Mod+Shift+Z',
  'Mod+Y',
  'Mod+C',
  'Mod+X',
  'Mod+V',
  'Mod+Shift+V',
  'Mod+A',
  'Delete',
  'Backspace',
  'Insert',
  'Escape',
  'PageUp',
  'PageDown',
  'Mod+Shift+ArrowLeft',
  'Mod+Shift+ArrowRight',
  'Mod+Shift+ArrowUp',
  'Mod+Shift+ArrowDown',
];

export const nameOf = (one: Command, at: Surroundings): string => (typeof one.name === 'string' ? one.name : one.name(at));
