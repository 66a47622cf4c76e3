/** Numbers that go into worked calculations alike everywhere. */
import { ratioOf, STANDARD_GRAVITY, type Quantity } from '../units/quantity';
import type { WorkedValue } from './finding';

export const put = (symbol: string, is: string, amount: Quantity, from: string): WorkedValue => ({ symbol, is, quantity: amount, from });

export const GRAVITY: WorkedValue = put('g', 'standard gravity, N per kg', ratioOf(STANDARD_GRAVITY), 'exact by definition');

/** A number that stands in the line above. */
export const above = (symbol: string, is: string, amount: Quantity): WorkedValue => put(symbol, is, amount, 'line above');
