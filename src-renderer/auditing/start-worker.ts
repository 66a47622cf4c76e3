/** Starts the audit worker under a policy of its own, which lets this one script in and no other. */
import address from './audit-worker?worker&url';
import type { WorkerLike } from './audit-link';

interface Policy {
  createScriptURL(url: string): unknown;
}
interface PolicyMaker {
  createPolicy(name: string, rules: { createScriptURL: (url: string) => string }): Policy;
}

/** Named in the content security policy that the page is served with. */
const POLICY = 'tallybeam-worker';

let policy: Policy | null = null;

export function startWorker(): WorkerLike {
  const maker = (window as { trustedTypes?: PolicyMaker }).trustedTypes;
  policy ??=
    maker?.createPolicy(POLICY, {
      createScriptURL: (url) => {
        if (url !== address) throw new TypeError(`no script but the audit worker is started here, not ${url}`);
        return url;
      },
    }) ?? null;
  return new Worker((policy?.createScriptURL(address) ?? address) as string, { type: 'module' });
}
