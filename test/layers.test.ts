/**
 * The layers: src-core stands alone, src-main and src-renderer meet only in it, and inside the core
 * each folder may use only those before it. Read from every import in the tree.
 */
import { mkdtempSync, mkdirSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join, relative, resolve } from 'node:path';
import { afterAll, expect, test } from 'vitest';

const top = resolve(import.meta.dirname, '..');
const CORE_ORDER = ['units', 'statics', 'goods', 'checks', 'site', 'audit', 'visit', 'package', 'words', 'paper'];

interface Import {
  readonly file: string;
  readonly specifier: string;
}

function importsBelow(folder: string): Import[] {
  const files = readdirSync(folder, { recursive: true, encoding: 'utf8' }).filter((name) => /\.(ts|svelte)$/.test(name));
  return files.flatMap((name) => {
    const file = join(folder, name);
    const text = readFileSync(file, 'utf8').replace(/\/\*[\s\S]*?\*\//g, '');
    const found: Import[] = [];
    for (const match of text.matchAll(/^\s*(?:import|export)\s+[^'";]*?from\s*['"]([^'"]+)['"]/gm))
      found.push({ file, specifier: match[1] ?? '' });
    for (const match of text.matchAll(/^\s*import\s*['"]([^'"]+)['"]/gm)) found.push({ file, specifier: match[1] ?? '' });
    for (const match of text.matchAll(/\b(?:import|require)\(\s*['"`]([^'"`]+)/g)) found.push({ file, specifier: match[1] ?? '' });
    return found;
  });
}

/** Every import that breaks the layers, as sentences. */
function trespasses(root: string): string[] {
  const faults: string[] = [];
  const inside = (path: string, folder: string) => !relative(join(root, folder), path).startsWith('..');
  for (const { file, specifier } of importsBelow(join(root, 'src-core'))) {
    const name = relative(root, file);
    if (!specifier.startsWith('.')) {
      faults.push(`${name} imports ${specifier}: the core has no dependencies`);
      continue;
    }
    const target = resolve(dirname(file), specifier);
    if (!inside(target, 'src-core')) {
      faults.push(`${name} imports ${specifier}: the core imports nothing outside itself`);
      continue;
    }
    const from = relative(join(root, 'src-core'), file).split('/')[0] ?? '';
    const to = relative(join(root, 'src-core'), target).split('/')[0] ?? '';
    if (CORE_ORDER.includes(from) && CORE_ORDER.indexOf(to) > CORE_ORDER.indexOf(from))
      faults.push(`${name} imports ${specifier}: ${from}/ stands below ${to}/`);
  }
  for (const [folder, forbidden] of [
    ['src-main', 'src-renderer'],
    ['src-renderer', 'src-main'],
  ] as const) {
    for (const { file, specifier } of importsBelow(join(root, folder))) {
      if (specifier.startsWith('.') && inside(resolve(dirname(file), specifier), forbidden))
        faults.push(`${relative(root, file)} imports ${specifier}: ${folder} and ${forbidden} meet only in src-core`);
    }
  }
  return faults;
}

test('every import in the tree keeps the layers', () => {
  expect(importsBelow(join(top, 'src-core')).length).toBeGreaterThan(10);
  expect(trespasses(top)).toEqual([]);
});

const made = mkdtempSync(join(tmpdir(), 'layers-'));
afterAll(() => rmSync(made, { recursive: true }));

test.each([
  ['a package', 'src-core/units/a.ts', "import x from 'chart.js';"],
  ['Node', 'src-core/units/a.ts', "import { readFileSync } from 'node:fs';"],
  ['the main process', 'src-core/site/a.ts', "export * from '../../src-main/store';"],
  ['the page, at run time', 'src-core/site/a.ts', "const x = await import('../../src-renderer/x');"],
  ['a higher layer of the core', 'src-core/statics/a.ts', "import { audit } from '../audit/audit';"],
  ['the site, from a check', 'src-core/checks/a.ts', "import type { Site } from '../site/site';"],
])('the test bites: core importing %s is a fault', (_, file, text) => {
  const root = join(made, String(Math.abs(hash(file + text))));
  for (const folder of ['src-core', 'src-main', 'src-renderer', dirname(file)]) mkdirSync(join(root, folder), { recursive: true });
  writeFileSync(join(root, file), text);
  expect(trespasses(root)).toHaveLength(1);
});

test('the test bites: main and page importing each other are faults', () => {
  const root = join(made, 'sides');
  for (const folder of ['src-core', 'src-main', 'src-renderer']) mkdirSync(join(root, folder), { recursive: true });
  writeFileSync(join(root, 'src-main/a.ts'), "import x from '../src-renderer/x';");
  writeFileSync(join(root, 'src-renderer/b.svelte'), "<script>\nimport x from '../src-main/x';\n</script>");
  expect(trespasses(root)).toHaveLength(2);
});

function hash(text: string): number {
  let value = 0;
  for (const letter of text) value = (value * 31 + (letter.codePointAt(0) ?? 0)) | 0;
  return value;
}
