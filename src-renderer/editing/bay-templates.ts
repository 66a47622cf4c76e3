/** Bay templates: kept from a bay of the site, and said in words where one is to choose between them. */
import { listed } from '../../src-core/checks/phrase';
import { addEntry } from '../../src-core/site/edits';
import { planOfBay, type BayPlan } from '../../src-core/site/new-site';
import type { Bay, Id, Site, TemplateGoods } from '../../src-core/site/site';
import { formatQuantity, type Reading } from '../../src-core/units/format';
import { lengthOf } from '../../src-core/units/quantity';
import { newId } from './ids';
import { nextName } from './names';
import type { OpenSite } from '../state/open-site.svelte';
import { goodsInPlan } from './rack-edits';
import type { Refused } from '../state/refusal';
import { countOf } from '../say';

/** A name for the bay's template that no other has: "Like bay A1". */
export function templateNameFor(site: Site, bay: Bay): string {
  const taken = new Set(site.bayTemplates.map(({ name }) => name));
  const name = `Like bay ${bay.name}`;
  return taken.has(name) ? nextName(`${name}, no. 1`, taken) : name;
}

/** @returns why it was refused, as a sentence; null if the template was kept */
export function keepTemplate(open: OpenSite, bay: Bay, name: string, goods: 'with goods' | 'without goods'): Refused | null {
  const template = { id: newId(), name, ...planOfBay(open.site, bay.id, goods) };
  const refused = open.edit(`Keep bay ${bay.name} as template ${name}`, (site) => addEntry(site, 'bayTemplates', template));
  if (refused !== null) return refused;
  open.lastTemplate = template.id;
  const count = goodsInPlan(template);
  open.say(
    `Bay template ${name} kept${count === 0 ? ', without goods' : ` with ${countOf(count, 'unit load')}`}. New runs and bays can be laid out by it.`,
  );
  return null;
}

/** The template to offer first: the one last kept or laid out by, else the newest; null where there is none. */
export const firstTemplate = ({ site, lastTemplate }: OpenSite): Id | null =>
  (site.bayTemplates.find(({ id }) => id === lastTemplate) ?? site.bayTemplates.at(-1))?.id ?? null;

/** What a bay by this plan is: "2 700 mm clear", "3 levels at 1 500 mm, …". */
export function planFacts(plan: BayPlan, site: Site, reading: Reading): readonly string[] {
  const length = (mm: number) => formatQuantity(lengthOf(mm), reading);
  const { levels } = plan;
  const goods = goodsInPlan(plan);
  const notice = site.notices.find(({ id }) => id === plan.noticeId)?.name;
  const frame = site.frameTypes.find(({ id }) => id === plan.frameTypeId)?.name;
  return [
    `${length(plan.clearEntryMm)} clear`,
    levels.length === 0
      ? 'no beam levels'
      : `${countOf(levels.length, 'level')} at ${listed(levels.map((level) => length(level.heightMm)))}`,
    notice === undefined ? 'no load notice' : `rated by ${notice}`,
    `${frame ?? 'frames of unknown type'}, ${length(plan.frameHeightMm)} high`,
    goods === 0 ? 'no goods' : countOf(goods, 'unit load'),
  ];
}

/** "2 × Crate at 75 mm and 950 mm · Drum at 1 900 mm, turned left for right"; empty where nothing stands there. */
export function goodsWords(goods: readonly TemplateGoods[], site: Site, reading: Reading): string {
  const alike = new Map<string, TemplateGoods[]>();
  for (const one of goods) {
    const key = `${one.unitLoadId} ${one.mirrored} ${one.towardsFrontMm}`;
    alike.set(key, [...(alike.get(key) ?? []), one]);
  }
  const length = (mm: number) => formatQuantity(lengthOf(mm), reading);
  return [...alike.values()]
    .map((all) => {
      const [first] = all;
      if (first === undefined) return '';
      const name = site.unitLoads.find(({ id }) => id === first.unitLoadId)?.name ?? 'goods';
      const count = all.length === 1 ? '' : `${all.length} × `;
      const turned = first.mirrored ? ', turned left for right' : '';
      const { towardsFrontMm: front } = first;
      const depth = front === 0 ? '' : `, ${length(Math.abs(front))} towards the ${front > 0 ? 'front' : 'rear'}`;
      return `${count}${name} at ${listed(all.map(({ atMm }) => length(atMm)))}${turned}${depth}`;
    })
    .join(' · ');
}
