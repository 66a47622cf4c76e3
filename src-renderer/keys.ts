/** Keys as written in the command table: "Mod+Shift+Z", "ArrowLeft", "M". "Mod" is Ctrl, or ⌘ on a Mac. */

export interface KeyPress {
  readonly key: string;
  readonly ctrlKey: boolean;
  readonly metaKey: boolean;
  readonly shiftKey: boolean;
  readonly altKey: boolean;
}

/** Letters go by what the key types, so that they follow the user's keyboard layout. */
export function pressed(event: KeyPress, chord: string, mac: boolean): boolean {
  const parts = chord.split('+');
  const key = parts.at(-1) ?? '';
  const has = (name: string) => parts.slice(0, -1).includes(name);
  const mod = mac ? event.metaKey : event.ctrlKey;
  const other = mac ? event.ctrlKey : event.metaKey;
  if (mod !== has('Mod') || other || event.shiftKey !== has('Shift') || event.altKey !== has('Alt')) return false;
  return key.length === 1 ? event.key.toLowerCase() === key.toLowerCase() : event.key === (key === 'Space' ? ' ' : key);
}

const NAMES: Readonly<Record<string, string>> = {
  ArrowLeft: '←',
  ArrowRight: '→',
  ArrowUp: '↑',
  ArrowDown: '↓',
  PageUp: 'Page Up',
  PageDown: 'Page Down',
  Escape: 'Esc',
};

/** As it is printed on the keys. */
export function chordName(chord: string, mac: boolean): string {
  const part = (name: string) => {
    if (name === 'Mod') return mac ? '⌘' : 'Ctrl';
    if (mac && name === 'Alt') return '⌥';
    return NAMES[name] ?? name;
  };
  return chord
    .split('+')
    .map(part)
    .join(mac ? ' ' : '+');
}

export const onMac = (): boolean => typeof navigator !== 'undefined' && /Mac|iPhone|iPad/.test(navigator.userAgent);
