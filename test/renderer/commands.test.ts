import { beforeEach, expect, test } from 'vitest';
import { COMMANDS, commandFor, GROUPS, isForDrawing, nameOf, type Command, type Surroundings } from '../../src-renderer/commands';
import { chordName, pressed, type KeyPress } from '../../src-renderer/keys';
import { shellOn } from './opened';
import { EMPTY } from './sites';

const press = (key: string, part: Partial<KeyPress> = {}): KeyPress => ({
  key,
  ctrlKey: false,
  metaKey: false,
  shiftKey: false,
  altKey: false,
  ...part,
});
const DRAWING = { inField: false, inDrawing: true };
const FIELD = { inField: true, inDrawing: false };
const ELSEWHERE = { inField: false, inDrawing: false };

let at: Surroundings;
beforeEach(async () => {
  at = await shellOn();
});

/** Every state that the table tells apart. */
async function states(): Promise<readonly (readonly [string, Surroundings])[]> {
  const chosen = await shellOn();
  chosen.open.select({ placementIds: ['p1'] });
  const several = await shellOn();
  several.open.select({ placementIds: ['p1', 'p2'] });
  const carrying = await shellOn();
  carrying.open.select({ placementIds: ['p1'] });
  carrying.open.pickUp('p1');
  const onFloor = await shellOn();
  onFloor.open.select({ levelId: null });
  const copied = await shellOn();
  copied.open.copiedLevel = copied.open.level;
  const copiedAndChosen = await shellOn();
  copiedAndChosen.open.copiedLevel = copiedAndChosen.open.level;
  copiedAndChosen.open.select({ placementIds: ['p1'] });
  const rules = await shellOn();
  rules.shell.show('rules');
  return [
    ['nothing chosen', await shellOn()],
    ['empty site', await shellOn(EMPTY)],
    ['goods chosen', chosen],
    ['several chosen', several],
    ['carrying', carrying],
    ['floor chosen', onFloor],
    ['level copied', copied],
    ['level copied, goods chosen', copiedAndChosen],
    ['another screen', rules],
  ];
}

test('ids are unique, groups are known, names read as a person says them', () => {
  expect(new Set(COMMANDS.map((one) => one.id)).size).toBe(COMMANDS.length);
  for (const one of COMMANDS) {
    expect(GROUPS).toContain(one.group);
    expect(nameOf(one, at)).toMatch(/^[A-Z]/);
  }
});

test('in no state do two allowed commands share a key', async () => {
  for (const [state, here] of await states()) {
    const seen = new Map<string, string>();
    for (const one of COMMANDS.filter((command) => command.when(here))) {
      for (const key of one.keys) {
        expect(seen.get(key) ?? one.id, `${key} when ${state}`).toBe(one.id);
        seen.set(key, one.id);
      }
    }
  }
});

test('letters and arrows without a modifier act in the drawing only, so that typing is never a command', () => {
  const alone = COMMANDS.flatMap((one) => one.keys).filter((key) => !key.includes('Mod+') && /(^|\+)(.|Arrow\w+|Enter|Space)$/.test(key));
  expect(alone.length).toBeGreaterThan(12);
  expect(alone.filter((key) => !isForDrawing(key))).toEqual([]);
  expect(['Mod+S', 'F1', 'PageDown', 'Escape', 'Delete', 'Mod+ArrowUp'].filter(isForDrawing)).toEqual([]);
});

const idFor = (event: KeyPress, focus: { inField: boolean; inDrawing: boolean }, mac = false): string | null =>
  commandFor(event, at, focus, mac)?.id ?? null;

test.each([
  ['Ctrl+S saves from anywhere', press('s', { ctrlKey: true }), ELSEWHERE, 'save'],
  ['Ctrl+S saves from a field', press('s', { ctrlKey: true }), FIELD, 'save'],
  ['an upper-case S with Ctrl is the same key', press('S', { ctrlKey: true }), ELSEWHERE, 'save'],
  ['a plain S does nothing', press('s'), DRAWING, null],
  ['Ctrl+Alt+S is something else', press('s', { ctrlKey: true, altKey: true }), ELSEWHERE, null],
  ['Ctrl+K lists all commands', press('k', { ctrlKey: true }), FIELD, 'commands'],
  ['F1 helps', press('F1'), FIELD, 'show-help'],
  ['the right arrow with nothing chosen does nothing', press('ArrowRight'), DRAWING, null],
  ['Ctrl and the up arrow go to the level above, from a field as well', press('ArrowUp', { ctrlKey: true }), FIELD, 'level-up'],
  ['Ctrl+A in a field selects its text', press('a', { ctrlKey: true }), FIELD, null],
  ['Page Down goes to the next bay', press('PageDown'), ELSEWHERE, 'next-bay'],
])('%s', (_, event, focus, id) => {
  expect(idFor(event, focus)).toBe(id);
});

test.each([
  ['the right arrow nudges by 10 mm', press('ArrowRight'), 'right-10'],
  ['Shift and the left arrow nudge by 1 mm', press('ArrowLeft', { shiftKey: true }), 'left-1'],
  ['Alt and the right arrow nudge by 100 mm', press('ArrowRight', { altKey: true }), 'right-100'],
  ['the up arrow moves to the level above', press('ArrowUp'), 'goods-up'],
  ['M turns left for right', press('m'), 'mirror'],
  ['Ctrl and the up arrow leave the goods and go to the level above', press('ArrowUp', { ctrlKey: true }), 'level-up'],
  ['Delete takes off', press('Delete'), 'delete'],
  ['Enter picks up', press('Enter'), 'pick-up'],
  ['Escape selects nothing', press('Escape'), 'unselect'],
])('with goods chosen %s', (_, event, id) => {
  at.open.select({ placementIds: ['p1'] });
  expect(idFor(event, DRAWING)).toBe(id);
});

test('with goods chosen, arrows and letters outside the drawing do nothing', () => {
  at.open.select({ placementIds: ['p1'] });
  expect([press('ArrowRight'), press('m'), press('Enter')].map((event) => idFor(event, ELSEWHERE))).toEqual([null, null, null]);
});

test.each([
  ['Enter puts down', press('Enter'), 'put-down'],
  ['Space puts down', press(' '), 'put-down'],
  ['Escape puts back', press('Escape'), 'put-back'],
  ['the right arrow tries 10 mm further', press('ArrowRight'), 'right-10'],
])('while goods are carried %s', (_, event, id) => {
  at.open.select({ placementIds: ['p1'] });
  at.open.pickUp('p1');
  expect(idFor(event, DRAWING)).toBe(id);
});

test('with a level chosen and no goods, the keys that copy and paste goods copy and paste the level', () => {
  const [copy, paste] = [press('c', { ctrlKey: true }), press('v', { ctrlKey: true })];
  expect([copy, paste].map((event) => idFor(event, DRAWING))).toEqual(['copy-level', 'paste']);
  at.open.copiedLevel = at.open.level;
  expect([copy, paste].map((event) => idFor(event, ELSEWHERE))).toEqual(['copy-level', 'paste-level']);
  at.open.select({ placementIds: ['p1'] });
  expect(idFor(copy, DRAWING)).toBe('copy');
  at.open.select({ levelId: null });
  expect(idFor(copy, DRAWING)).toBeNull();
});

test('text that is marked on the page is copied as text; goods that are chosen come first', () => {
  const copy = press('c', { ctrlKey: true });
  const marked = { ...DRAWING, textMarked: true };
  expect(commandFor(copy, at, marked, false)).toBeNull();
  at.open.select({ placementIds: ['p1'] });
  expect(commandFor(copy, at, marked, false)?.id).toBe('copy');
});

test.each([
  ['Ctrl, Shift and the up arrow swap the level with the one above', press('ArrowUp', { ctrlKey: true, shiftKey: true }), 'swap-level-up'],
  ['Ctrl, Shift and the right arrow move the bay', press('ArrowRight', { ctrlKey: true, shiftKey: true }), 'bay-right'],
  ['Ctrl, Shift and S keep the bay as a template', press('S', { ctrlKey: true, shiftKey: true }), 'keep-template'],
])('%s; in a field the arrows mark text', (_, event, id) => {
  expect(idFor(event, ELSEWHERE)).toBe(id);
  if (event.key.startsWith('Arrow')) expect(idFor(event, FIELD)).toBeNull();
});

test('on a Mac the command key stands for Ctrl, in deed and in print', () => {
  expect(idFor(press('s', { metaKey: true }), ELSEWHERE, true)).toBe('save');
  expect(idFor(press('s', { ctrlKey: true }), ELSEWHERE, true)).toBeNull();
  expect(chordName('Mod+Shift+Z', true)).toBe('⌘ Shift Z');
  expect(chordName('Mod+Shift+Z', false)).toBe('Ctrl+Shift+Z');
});

test('a key is matched by what it types, wherever it lies on the keyboard', () => {
  expect(pressed(press('z', { ctrlKey: true }), 'Mod+Z', false)).toBe(true);
  expect(pressed(press('w', { ctrlKey: true }), 'Mod+Z', false)).toBe(false);
  expect(pressed(press(' '), 'Space', false)).toBe(true);
});

test('every command that is allowed can be run in every state without a fault', async () => {
  // What reaches for the browser itself is tried in the end-to-end tests.
  const elsewhere = new Set(['export']);
  const ids = COMMANDS.map((one) => one.id).filter((id) => !elsewhere.has(id));
  const ran = new Set<string>();
  for (const id of ids) {
    for (const [state, here] of await states()) {
      const one = COMMANDS.find((command) => command.id === id) as Command;
      if (!one.when(here)) continue;
      expect(() => one.run(here), `${id} when ${state}`).not.toThrow();
      ran.add(id);
      here.open.close();
    }
  }
  // Undo, redo, paste and going back want something done before; it is done here.
  const { open, shell } = at;
  open.select({ placementIds: ['p1'] });
  for (const id of ['duplicate', 'undo', 'redo', 'copy', 'paste', 'next-bay', 'back']) {
    const one = COMMANDS.find((command) => command.id === id) as Command;
    expect(one.when({ open, shell }), id).toBe(true);
    one.run({ open, shell });
    ran.add(id);
  }
  expect([...ids].filter((id) => !ran.has(id))).toEqual([]);
});

test('in pounds and inches the arrows nudge by round inches, said so and kept so', () => {
  at.open.select({ placementIds: ['p1'] });
  at.open.switchUnits();
  const right = COMMANDS.find((one) => one.id === 'right-10');
  if (right === undefined) throw new Error('no such command');
  expect(nameOf(right, at)).toBe('Move right by 0.5\u00a0in');
  const atMm = () => at.open.bay?.levels[0]?.placements.find(({ id }) => id === 'p1')?.atMm;
  expect(atMm()).toBe(75);
  right.run(at);
  // 75 mm and half an inch of 25.4 mm.
  expect(atMm()).toBe(87.7);
});
