/** The places that a change of a library entry touches, by name. */
import { usesOf, type Use } from '../../src-core/site/edits';
import type { Library } from '../../src-core/site/lookup';
import type { Id, Site } from '../../src-core/site/site';

/** "bay A1, level 2", "frame A0|A1", in the order of the site. */
export function usedBy(site: Site, library: Library, id: Id): readonly string[] {
  const uses = usesOf(site, library, id);
  if (uses.length === 0) return [];
  const names = new Map<Id, string>();
  for (const one of site.unitLoads) names.set(one.id, one.name);
  for (const one of site.notices) names.set(one.id, `load notice ${one.name}`);
  for (const one of site.bayTemplates) names.set(one.id, `bay template ${one.name}`);
  for (const run of site.runs) {
    names.set(run.id, `run ${run.name}`);
    for (const frame of run.frames) names.set(frame.id, `frame ${frame.name}`);
    for (const bay of run.bays) {
      names.set(bay.id, `bay ${bay.name}`);
      bay.levels.forEach((level, i) => names.set(level.id, `bay ${bay.name}, level ${i + 1}`));
    }
  }
  const nameOf = ({ kind, id: of }: Use) => `${names.get(of) ?? kind}${kind === 'floor of a bay' ? ', floor' : ''}`;
  return uses.map(nameOf);
}
