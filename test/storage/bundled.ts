import { join } from 'node:path';
import { build } from 'vite';

/** A program of this folder as one file of plain JavaScript, which starts ten times faster than from TypeScript. */
export async function bundled(name: string, folder: string): Promise<string> {
  await build({
    configFile: false,
    logLevel: 'silent',
    ssr: { noExternal: true },
    build: {
      ssr: true,
      outDir: folder,
      rollupOptions: { input: join(import.meta.dirname, `${name}.ts`), output: { entryFileNames: `${name}.mjs` } },
    },
  });
  return join(folder, `${name}.mjs`);
}
