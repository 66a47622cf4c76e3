/** Every screen, form and dialog of the program, one after another, in the demo. */
import type { Page } from 'playwright-core';
import { openDemo } from './program';
import { checked, choice, command, goods, goToBay, goToLevel, selectGoods, type } from './steps';

const BEARINGS = ['even over its width', 'stepped, in columns', 'sloped', 'profile of the pile', 'on bearers', 'on feet'];
const LIBRARIES = ['Unit loads', 'Pallets', 'Load notices', 'Beam types', 'Frame types', 'Floors', 'Bay templates'];
/** Commands that go somewhere but are no screens of their own. */
const NO_SCREENS = /^(Find a bay|Next bay|Previous bay|Level above|Level below|Back to where)/;

/** `part` is a selector of what is new, where the rest of the page was visited before. */
type Visit = (name: string, part?: string) => Promise<void>;

/** Forms and findings beside the drawing. */
const SIDE = 'aside';

/** The list of sites, empty and not; to be walked on a fresh folder, and followed by `walkSite`. */
export async function walkList(page: Page, visit: Visit): Promise<void> {
  await page.getByRole('heading', { name: 'Nothing here yet' }).waitFor();
  await visit('empty list');
  await page.getByRole('button', { name: 'Make site' }).click();
  await visit('list with an error at a field');
  await page.getByLabel('Site file to bring in').setInputFiles({
    name: 'goods.csv',
    mimeType: 'text/csv',
    buffer: Buffer.from('Goods;Mass'),
  });
  await page.getByRole('dialog').waitFor();
  await visit('file that cannot be opened');
  await page.getByRole('dialog').getByRole('button', { name: 'Close' }).click();
  await openDemo(page);
  await checked(page);
  await page.getByRole('button', { name: 'Halverwick depot (demo)' }).click();
  await page.getByRole('button', { name: 'Remove Halverwick depot (demo)…' }).click();
  await visit('question whether to remove a site');
  await page.getByRole('button', { name: 'Keep it' }).click();
  await visit('list with a site');
  await page.getByRole('button', { name: 'Halverwick depot (demo)', exact: true }).click();
  await page.locator('[data-bay]').first().waitFor();
  await checked(page);
}

/** The bay with its levels, forms and findings. */
export async function walkBay(page: Page, visit: Visit): Promise<void> {
  await visit('bay at rest');
  await goToBay(page, 'B2');
  await goToLevel(page, 2);
  await visit('front-heavy level');
  await page.locator('summary', { hasText: 'Worked calculation' }).first().click();
  await visit('worked calculation', SIDE);
  await goToBay(page, 'C2');
  await goToLevel(page, 3);
  await visit('level that is not assessable');
  await goToBay(page, 'A4');
  await goToLevel(page, 0);
  await visit('floor of the bay');
  await selectGoods(page, 'a4-l3-g1');
  await visit('goods selected');
  await page.getByRole('button', { name: 'Pick up', exact: true }).click();
  await visit('goods carried');
  await page.keyboard.press('Escape');
  await page.getByRole('button', { name: 'Edit these goods…' }).click();
  await visit('goods edited');

  await page.getByRole('button', { name: 'Add goods…' }).click();
  await choice(page, 'Goods$').selectOption({ label: 'new goods…' });
  await visit('goods to add, nothing typed', SIDE);
  for (const [label, text] of [
    ['Width along the beam', '800'],
    ['Depth', '1200'],
    ['Height with pallet', '1200'],
  ] as const)
    await type(page.getByRole('textbox', { name: new RegExp(`^${label}`) }).first(), text);
  for (const bearing of BEARINGS) {
    await choice(page, 'Stands on the beams').selectOption({ label: bearing });
    await visit(`goods to add, ${bearing}`, bearing === BEARINGS[0] ? undefined : SIDE);
  }
  await type(page.getByRole('textbox', { name: /^Mass without pallet/ }), '-1');
  await visit('goods to add, with an error at a field', SIDE);

  await page.getByRole('button', { name: 'Bay…', exact: true }).click();
  await visit('bay form', SIDE);
  await page.getByRole('button', { name: 'Frames…' }).click();
  await page.getByRole('button', { name: 'Record damage' }).first().click();
  await visit('frames form', SIDE);
  await page.getByRole('button', { name: 'Level: height, beams, damage, deck…' }).click();
  await choice(page, 'Deck').selectOption({ label: 'mesh deck' });
  await checked(page);
  await visit('level form', SIDE);
}

/** Every other screen that the command list goes to. */
export async function walkScreens(page: Page, visit: Visit): Promise<void> {
  await page.keyboard.press('Control+K');
  const dialog = page.getByRole('dialog', { name: 'All commands' });
  const names = await dialog
    .locator('h3', { hasText: /^Go to$/ })
    .locator('+ ul button > span:first-child')
    .allInnerTexts();
  await page.keyboard.press('Escape');
  await dialog.waitFor({ state: 'detached' });
  const screens = names.filter((name) => !NO_SCREENS.test(name) && name !== 'Bay');
  if (screens.length < 5) throw new Error(`the command list goes to too few screens: ${names.join(', ')}`);
  for (const screen of screens) {
    await command(page, screen);
    await page.getByRole('button', { name: '← Back to the bay' }).waitFor();
    if (screen.startsWith('Libraries')) {
      for (const library of LIBRARIES) {
        await page.getByRole('navigation', { name: 'Libraries' }).getByRole('button', { name: library }).click();
        await visit(`library: ${library}`, library === LIBRARIES[0] ? undefined : 'main');
      }
    } else if (screen.startsWith('Rules')) {
      await page
        .getByRole('button', { name: /^Change: / })
        .first()
        .click();
      await visit(screen);
    } else {
      await page.waitForLoadState('networkidle');
      await visit(screen);
    }
  }
  await page.getByRole('button', { name: '← Back to the bay' }).click();
  await page.locator('[data-bay]').first().waitFor();
}

/** Menu and dialogs over the bay. */
export async function walkDialogs(page: Page, visit: Visit): Promise<void> {
  await page.getByRole('button', { name: 'Menu' }).click();
  await visit('menu');
  await page.keyboard.press('Escape');
  await selectGoods(page, 'a4-l1-g1');
  const dialogs: readonly (readonly [key: string | null, name: string])[] = [
    ['Control+K', 'All commands'],
    ['Control+F', 'Find'],
    ['Control+M', 'Move'],
    ['Control+,', 'Preferences'],
    [null, 'New run of bays'],
    [null, 'Give other bays'],
  ];
  for (const [key, name] of dialogs) {
    if (key === null) await command(page, name);
    else await page.keyboard.press(key);
    const dialog = page.getByRole('dialog', { name: new RegExp(`^${name}`) });
    await dialog.waitFor();
    await visit(`dialog: ${name}`, 'dialog');
    await page.keyboard.press('Escape');
    await dialog.waitFor({ state: 'detached' });
  }
  await walkLevelsAndTemplates(page, visit);
  await goods(page, 'a4-l1-g1').press('M');
  await page.getByRole('button', { name: 'Halverwick depot (demo)' }).click();
  await page.getByRole('dialog').waitFor();
  await visit('question before leaving');
  await page.getByRole('dialog').getByRole('button', { name: 'Close' }).click();
}

/** A copied level to paste, and a bay that is kept as a template and laid out by: the library shows it afterwards. */
async function walkLevelsAndTemplates(page: Page, visit: Visit): Promise<void> {
  const dialog = page.getByRole('dialog');
  const putAway = async () => {
    await page.keyboard.press('Escape');
    await dialog.waitFor({ state: 'detached' });
  };
  await page.getByRole('button', { name: 'Copy level' }).click();
  await page.getByRole('button', { name: 'Paste level…' }).click();
  await choice(dialog, 'To').selectOption({ label: 'bays that are ticked here' });
  await dialog.getByRole('checkbox', { name: 'A1' }).check();
  await visit('dialog: paste a level', 'dialog');
  await putAway();
  await page.keyboard.press('Control+Shift+S');
  await dialog.waitFor();
  await visit('dialog: keep a bay as a template', 'dialog');
  await page.keyboard.press('Enter');
  await dialog.waitFor({ state: 'detached' });
  for (const name of ['New run of bays', 'Add several bays']) {
    await command(page, name);
    await dialog.waitFor();
    await visit(`dialog: ${name}, by a template`, 'dialog');
    await putAway();
  }
}
