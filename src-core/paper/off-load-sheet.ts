/** The off-load list: what to empty now, what not to fill again, and why. */
import type { Id } from '../site/site';
import { stillOpen, type OpenAction } from '../visit/actions';
import { offLoadList } from '../visit/off-load';
import { actionBlocks } from './action-blocks';
import { closingBlocks, counted, paperOf, type PaperInput } from './context';
import { facts, fact, paragraph, type Paper } from './paper';

/** Of the whole site, from its open actions. */
export function offLoadSheet(input: PaperInput, actions: readonly OpenAction[]): Paper {
  const { site } = input;
  const open = stillOpen(actions);
  const locations = offLoadList(site, open);
  const ids = new Set<Id>(open.flatMap(({ bayIds }) => bayIds));
  const bays = site.runs.flatMap((run) => run.bays.filter(({ id }) => ids.has(id)));
  const unload = locations.filter(({ what }) => what === 'unload').length;
  return paperOf(input, bays, {
    kind: 'off-load-list',
    title: 'Off-load list',
    about: site.name,
    wide: true,
    blocks: [
      facts([
        fact('To unload at once', [counted(unload, 'level')]),
        fact('Not to reload', [counted(locations.length - unload, 'level')]),
        fact('Open actions', [String(open.length)]),
      ]),
      paragraph([
        'Both bays of a damaged frame are emptied, and those tied to it from behind. Bar each level from reloading until whoever signs below has released it.',
      ]),
      ...actionBlocks(site, actions, 'locations'),
      ...closingBlocks(input, bays),
      {
        kind: 'sign-off',
        lines: [
          { role: 'Unloaded by', signed: null },
          { role: 'Released for use by (competent person)', signed: null },
        ],
      },
    ],
  });
}
