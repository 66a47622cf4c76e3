import { fileURLToPath } from 'node:url';
import { svelte } from '@sveltejs/vite-plugin-svelte';
import { defineConfig } from 'vitest/config';

const path = (relative: string) => fileURLToPath(new URL(relative, import.meta.url));

// One config builds the page, the main process with its command-line entries, and the preload.
export default defineConfig({
  root: path('src-renderer'),
  base: './',
  cacheDir: path('node_modules/.vite'),
  publicDir: false,
  plugins: [svelte()],
  worker: { format: 'es' },
  environments: {
    client: {
      build: {
        outDir: path('dist/renderer'),
        emptyOutDir: true,
        target: 'chrome130',
        rollupOptions: { input: path('src-renderer/index.html') },
      },
    },
    main: {
      consumer: 'server',
      resolve: { noExternal: true, external: ['electron'], conditions: ['node', 'import', 'default'] },
      build: {
        outDir: path('dist/main'),
        emptyOutDir: true,
        target: 'node20',
        ssr: true,
        minify: false,
        rollupOptions: {
          input: {
            main: path('src-main/main.ts'),
            serve: path('src-main/serve.ts'),
            start: path('src-main/start.ts'),
            batch: path('src-main/batch.ts'),
          },
          external: ['electron', /^node:/],
          output: { format: 'es', entryFileNames: '[name].js', chunkFileNames: 'shared-[name].js' },
        },
      },
    },
    preload: {
      consumer: 'server',
      resolve: { noExternal: true, external: ['electron'] },
      build: {
        outDir: path('dist/preload'),
        emptyOutDir: true,
        target: 'node20',
        ssr: true,
        minify: false,
        rollupOptions: {
          input: { preload: path('src-main/preload.ts') },
          external: ['electron'],
          output: { format: 'cjs', entryFileNames: '[name].cjs' },
        },
      },
    },
  },
  builder: {
    // Named one by one: a loop over all environments would also build `ssr`, which has no entry.
    async buildApp(builder) {
      const { client, main, preload } = builder.environments;
      if (!client || !main || !preload) throw new Error('vite.config.ts: an environment is missing');
      await builder.build(client);
      await builder.build(main);
      await builder.build(preload);
    },
  },
  test: {
    // The projects share nothing of the page's own settings but the Svelte compiler.
    projects: [
      {
        root: path('.'),
        test: { name: 'core', include: ['test/core/**/*.test.ts', 'test/reference/**/*.test.ts', 'test/*.test.ts'], testTimeout: 60_000 },
      },
      {
        root: path('.'),
        test: {
          name: 'main',
          include: ['test/main/**/*.test.ts', 'test/storage/**/*.test.ts'],
          testTimeout: 120_000,
          server: { deps: { inline: ['electron-store'] } },
        },
        resolve: { alias: { electron: path('test/main/electron-stand-in.ts') } },
      },
      { root: path('.'), plugins: [svelte()], test: { name: 'renderer', include: ['test/renderer/**/*.test.ts'], testTimeout: 60_000 } },
      {
        root: path('.'),
        test: {
          name: 'end-to-end',
          include: ['test/e2e/**/*.test.ts'],
          globalSetup: [path('test/e2e/setup.ts')],
          testTimeout: 120_000,
          hookTimeout: 120_000,
          // One browser at a time: the machine may have only two cores.
          fileParallelism: false,
        },
      },
    ],
  },
});
