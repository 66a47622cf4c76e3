/** Edits of the site as a whole and of its rules. */
import type { CheckName } from '../checks/finding';
import type { RuleKey } from '../checks/rule-sets';
import { requirePart } from './check-part';
import { changed } from './edit-paths';
import type { Rules, Site } from './site';

/** Changes name, notes, units and conditions. */
export function editSite(site: Site, part: Partial<Pick<Site, 'name' | 'notes' | 'units' | 'seismic' | 'outdoors'>>): Site {
  const after = changed<Site>(site, part);
  // Runs and libraries are as they were: only what was changed is looked at.
  if (after !== site)
    requirePart(
      site,
      'site',
      { ...after, pallets: [], unitLoads: [], notices: [], beamTypes: [], frameTypes: [], floors: [], bayTemplates: [], runs: [] },
      site,
    );
  return after;
}

/** Changes the rule set or a switch of it. Values changed with a reason stay changed. */
export function editRules(site: Site, part: Partial<Rules>): Site {
  const after = changed<Rules>(site.rules, part);
  return after === site.rules ? site : { ...site, rules: requirePart(site, 'rules', after, site.rules) };
}

/** Departs from the rule set in one value, with a reason; in place of an earlier change of the same. */
export function changeRule(site: Site, key: RuleKey, value: number, reason: string): Site {
  const others = site.rules.changed.filter((change) => change.key !== key);
  return editRules(site, { changed: [...others, { key, value, reason }] });
}

/** Goes back to the rule set's own value. */
export const resetRule = (site: Site, key: RuleKey): Site =>
  editRules(site, { changed: site.rules.changed.filter((change) => change.key !== key) });

/** Leaves a check out, with a reason; it is then listed as not checked wherever results stand. */
export function leaveOut(site: Site, check: CheckName, reason: string): Site {
  const others = site.rules.leftOut.filter((one) => one.check !== check);
  return editRules(site, { leftOut: [...others, { check, reason }] });
}

export const askFor = (site: Site, check: CheckName): Site =>
  editRules(site, { leftOut: site.rules.leftOut.filter((one) => one.check !== check) });
