/** Whatever a file may hold, the audit answers with whole findings: no exception, nothing that is not a number. */
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { auditSite } from '../../../src-core/audit/audit';
import type { Finding, Text } from '../../../src-core/checks/finding';
import { arbitrarySite } from '../../make-random';

/** Every quantity of a finding, with where it stands. */
function quantitiesOf({ check, demand, allowed, says, notes, worked }: Finding): readonly (readonly [string, number])[] {
  const inText = (text: Text) => text.flatMap((part) => (typeof part === 'string' ? [] : [part.value]));
  return [
    ...[demand, allowed].flatMap((one) => (one === null ? [] : [[`${check}: figure`, one.value] as const])),
    ...[says, ...notes].flatMap(inText).map((value) => [`${check}: sentence`, value] as const),
    ...worked.flatMap(({ what, result, values }) =>
      [result, ...values].map(({ quantity }) => [`${check}, ${what}`, quantity.value] as const),
    ),
  ];
}

/** What is wrong with a finding, in words. */
function faultsOf(one: Finding): readonly string[] {
  const { check, utilisation, verdict, missing, says } = one;
  return [
    // Without end only where nothing at all is allowed.
    ...(utilisation === null || utilisation >= 0 ? [] : [`${check}: utilisation ${utilisation}`]),
    ...(says.length > 0 ? [] : [`${check}: says nothing`]),
    ...(verdict !== 'not-assessable' || missing.length > 0 ? [] : [`${check}: not assessable, with nothing missing`]),
    ...missing
      .filter(({ input, how, field }) => input === '' || how === '' || field === '')
      .map(() => `${check}: a missing input without words`),
    ...quantitiesOf(one)
      .filter(([, value]) => !Number.isFinite(value))
      .map(([where, value]) => `${where}: ${value}`),
  ];
}

test('on any site that a file may hold every finding is whole', () => {
  fc.assert(
    fc.property(arbitrarySite(), (site) => {
      const faults = auditSite(site, '2026-06-01').runs.flatMap(({ findings, bays, frames }) =>
        [
          ...findings,
          ...bays.flatMap((bay) => [...bay.findings, ...bay.levels.flatMap((level) => level.findings)]),
          ...frames.flatMap((frame) => frame.findings),
        ].flatMap(faultsOf),
      );
      expect(faults).toEqual([]);
    }),
    // A counterexample of a whole site is not shrunk, which would take longer than reading it.
    { numRuns: 400, endOnFailure: true },
  );
});
