/** The change sheet for the maker: a bay before and after, every figure that differs, what has to be done, and room to confirm. */
import { bayState, compareBays, type FigureChange, type VerdictChange } from '../audit/compare-bays';
import { findBay } from '../site/lookup';
import type { Bay, Id, Run, Site } from '../site/site';
import type { Place } from '../checks/finding';
import { CHECK_WORDS } from '../words/check-names';
import { closingBlocks, paperOf, type PaperInput } from './context';
import { placeTitle } from './findings';
import { fact, facts, heading, kgCell, list, mmCell, NONE, paragraph, table, type Block, type Cell, type Paper } from './paper';

/**
 * @param input the site as it is to be, with its audit
 * @param before the site as it stands
 * @throws RangeError if the bay is not in both
 */
export function changeSheet(input: PaperInput, before: Site, bayId: Id): Paper {
  const { site, today } = input;
  const { run, bay } = findBay(site, bayId);
  const { run: oldRun, bay: oldBay } = findBay(before, bayId);
  const was = bayState(before, oldRun.id, bayId, today);
  const is = bayState(site, run.id, bayId, today);
  const { figures, verdicts, steps } = compareBays(was, is);
  const place = (at: Place): Cell => [placeTitle({ site, run, bay }, at)];
  return paperOf(input, [bay], {
    kind: 'change-sheet',
    title: 'Change sheet for the maker',
    about: `Bay ${bay.name}, run ${run.name}`,
    blocks: [
      paragraph(['This asks the maker or supplier to confirm a change. Until they have, in writing, the changed bay is rated by nobody.']),
      facts([fact('Verdict as it stands', { verdict: was.audit.verdict }), fact('Verdict as planned', { verdict: is.audit.verdict })]),
      heading('Before and after'),
      elevation('As it stands', before, oldBay),
      elevation('As planned', site, bay),
      { kind: 'drawing', drawing: 'bay', runId: run.id, bayId, levelId: null, says: `Front view of bay ${bay.name} as planned, to scale` },
      ...changes(figures, verdicts, place),
      ...(steps.length === 0 ? [] : [heading('Before and after the work'), ...list(steps)]),
      ...closingBlocks(input, [bay]),
      {
        kind: 'sign-off',
        lines: [
          { role: 'Asked by', signed: null },
          { role: 'Confirmed by the maker or supplier, as drawn', signed: null },
        ],
      },
    ],
  });
}

function elevation(caption: string, site: Site, bay: Bay): Block {
  return table(
    `${caption}, from the top down`,
    ['Level', '#Height of beam', 'Beams', '#Goods'],
    bay.levels
      .map((level, index) => [
        [`Level ${index + 1}`],
        mmCell(level.heightMm),
        [site.beamTypes.find(({ id }) => id === level.beamTypeId)?.name ?? 'not known'],
        kgCell(goodsKg(site, level.placements)),
      ])
      .toReversed(),
  );
}

function goodsKg(site: Site, placements: Run['bays'][number]['onFloor']): number | null {
  let sum = 0;
  for (const { unitLoadId } of placements) {
    const load = site.unitLoads.find(({ id }) => id === unitLoadId);
    const pallet = load?.palletId === null ? 0 : (site.pallets.find(({ id }) => id === load?.palletId)?.massKg ?? null);
    if (load === undefined || load.goodsKg === null || pallet === null) return null;
    sum += load.goodsKg + pallet;
  }
  return sum;
}

function changes(figures: readonly FigureChange[], verdicts: readonly VerdictChange[], place: (at: Place) => Cell): readonly Block[] {
  if (figures.length + verdicts.length === 0) return [paragraph(['Nothing differs.'])];
  return [
    heading('What changes'),
    ...(verdicts.length === 0
      ? []
      : [
          table(
            'Verdicts that change',
            ['Where', 'Check', 'Before', 'After'],
            verdicts.map(({ place: at, check, before, after }) => [
              place(at),
              [CHECK_WORDS[check].name],
              before === null ? ['not made'] : { verdict: before },
              after === null ? ['not made'] : { verdict: after },
            ]),
          ),
        ]),
    ...(figures.length === 0
      ? []
      : [
          table(
            'Figures that change',
            ['Where', 'What', '#Before', '#After'],
            figures.map(({ place: at, check, what, before, after }) => [
              place(at),
              [check === null ? what : `${CHECK_WORDS[check].name}: ${what}`],
              before === null ? NONE : [before],
              after === null ? NONE : [after],
            ]),
          ),
        ]),
  ];
}
