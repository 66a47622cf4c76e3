/** The bay's own checks of what stands in it: its total, and goods on its floor. */
import type { Finding } from '../checks/finding';
import { bayTotal } from '../checks/level-total';
import { placement } from '../checks/placement';
import { asked, type BayWork, type SiteContext } from './context';
import { levelName, outline, statedBy } from './level';

export function bayContentsFindings(context: SiteContext, work: BayWork): readonly Finding[] {
  const found: Finding[] = [];
  const { place, bay, levels, onFloor } = work;
  if (asked(context, 'placement') && onFloor.length > 0)
    found.push(...placement({ place, level: `The floor of bay ${bay.name}`, clearEntry: bay.clearEntryMm, goods: onFloor.map(outline) }));
  if (asked(context, 'bay-total'))
    found.push(
      bayTotal({
        place,
        bay: `bay ${bay.name}`,
        levels: levels.map(({ index, totalKg }) => ({ name: levelName(index).toLowerCase(), kg: totalKg })),
        missing: levels.flatMap(({ goods }) => goods.flatMap((one) => (one.goods.grossKg === null ? one.goods.missing : []))),
        limit: statedBy(work, 'bayKg', 'rated bay load', 'Read it from the load notice, or ask the maker for it in writing.'),
        closeAbove: context.rules.value.closeAbove,
      }),
    );
  return found;
}
