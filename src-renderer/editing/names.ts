/** Names for what is added, so that nobody has to type one. */

/** "A7" after "A6"; a name without a number gets one. */
export function nextName(name: string, taken: ReadonlySet<string>): string {
  const [, stem = name, digits = '1'] = /^(.*?)(\d+)$/.exec(name) ?? [];
  for (let number = Number(digits) + 1; ; number++) {
    const next = `${stem}${String(number).padStart(digits.startsWith('0') ? digits.length : 1, '0')}`;
    if (!taken.has(next)) return next;
  }
}

/** "C" after runs "A" and "B". */
export function nextRunName(taken: ReadonlySet<string>): string {
  for (let i = 0; ; i++) {
    const letter = String.fromCharCode(65 + (i % 26));
    const name = i < 26 ? letter : `${letter}${Math.floor(i / 26)}`;
    if (!taken.has(name)) return name;
  }
}

/** "A6|A3": a frame is called after the bays at its sides; unlike every other frame of its run. */
export function frameNameBetween(left: string, right: string, taken: ReadonlySet<string>): string {
  const name = `${left}|${right}`;
  for (let number = 1; ; number++) {
    const next = number === 1 ? name : `${name} (${number})`;
    if (!taken.has(next)) return next;
  }
}
