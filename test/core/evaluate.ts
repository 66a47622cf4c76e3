/**
 * A pocket calculator for worked calculations: numbers, + − · / ^, brackets, and the symbols that a line
 * lists. It shares nothing with the core, so that a formula is checked by what it says.
 */
export function evaluate(formula: string, symbols: Readonly<Record<string, number>>): number {
  const tokens = [...formula.matchAll(/\s*(?:(\d+(?:\.\d+)?)|([A-Za-z][A-Za-z0-9_]*)|([-+−·/^()]))/gy)];
  const length = tokens.reduce((sum, token) => sum + token[0].length, 0);
  if (length !== formula.trimEnd().length) throw new Error(`cannot read "${formula}" from "${formula.slice(length)}"`);
  let next = 0;
  const sign = () => tokens[next]?.[3];
  const take = (...signs: string[]) => {
    const found = sign();
    if (found === undefined || !signs.includes(found)) return undefined;
    next += 1;
    return found;
  };

  const atom = (): number => {
    if (take('(')) {
      const inner = sum();
      if (!take(')')) throw new Error(`a bracket is not closed in "${formula}"`);
      return inner;
    }
    const token = tokens[next];
    next += 1;
    if (token?.[1] !== undefined) return Number(token[1]);
    const name = token?.[2];
    if (name === undefined) throw new Error(`a number is missing in "${formula}"`);
    const value = symbols[name];
    if (value === undefined) throw new Error(`"${name}" of "${formula}" is not among the values`);
    return value;
  };
  const power = (): number => {
    const base = atom();
    return take('^') ? base ** power() : base;
  };
  const unary = (): number => (take('-', '−') ? -unary() : power());
  const product = (): number => {
    let value = unary();
    for (;;) {
      if (take('·')) value *= unary();
      else if (take('/')) value /= unary();
      else return value;
    }
  };
  const sum = (): number => {
    let value = product();
    for (;;) {
      if (take('+')) value += product();
      else if (take('-', '−')) value -= product();
      else return value;
    }
  };
  const value = sum();
  if (next !== tokens.length) throw new Error(`"${formula}" goes on after its end`);
  return value;
}
