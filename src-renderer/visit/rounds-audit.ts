/** The site's audit as rounds need it: light as the worker sends it, whole for bays where a sag was read. */
import type { BayAudit, RunAudit, SiteAudit } from '../../src-core/audit/types';
import { worstVerdict } from '../../src-core/checks/finding';
import type { Id, Site } from '../../src-core/site/site';
import type { Visit } from '../../src-core/visit/visit';

export function roundsAudit(
  site: Site,
  lights: ReadonlyMap<Id, RunAudit>,
  visits: readonly Visit[],
  bayAudit: (runId: Id, bayId: Id) => BayAudit,
): SiteAudit {
  const sagged = new Set(visits.flatMap(({ bays }) => bays.filter(({ sags }) => sags.length > 0).map(({ bayId }) => bayId)));
  const runs = site.runs.flatMap(({ id, bays }): readonly RunAudit[] => {
    const light = lights.get(id);
    if (light === undefined) return [];
    // The worker may be a step behind: of a bay that is gone nothing more is asked.
    const there = new Set(bays.map((bay) => bay.id));
    const whole = (bay: BayAudit) => (sagged.has(bay.bayId) && there.has(bay.bayId) ? bayAudit(id, bay.bayId) : bay);
    return [{ ...light, bays: light.bays.map(whole) }];
  });
  return { verdict: worstVerdict(runs.map(({ verdict }) => verdict)), runs };
}
