import { fileURLToPath } from 'node:url';
import { svelte } from '@sveltejs/vite-plugin-svelte';
import { defineConfig } from 'vite';

const path = (relative: string) => fileURLToPath(new URL(relative, import.meta.url));

// One config builds the page, the main process with its command-line entries, and the preload.
export default defineConfig({
  root: path('src-renderer'),
  base: './',
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
});
