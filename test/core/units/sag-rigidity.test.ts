import { expect, test } from 'vitest';
import { formatQuantity } from '../../../src-core/units/format';
import { quantity } from '../../../src-core/units/quantity';

// 12.43 mm of scenario S10 times its EI of 194.67 kN·m² is 2.42 kN·m³;
// 1 kN·m³ = 10^12 N·mm³, and 1 kip·in³ = 4 448.2216 N · 16 387.064 mm³ (NIST SP 811, Appendix B).
test('a sag times EI is shown in units that can be read, to three figures', () => {
  const sag = quantity('sagRigidity', 12.43 * 194_673_360_000);
  expect(formatQuantity(sag, { units: 'metric', locale: 'en-GB' })).toBe('2.42\u00a0kN·m³');
  expect(formatQuantity(sag, { units: 'us', locale: 'en-US' })).toBe('33,196\u00a0kip·in³');
});
