import { fileURLToPath } from 'node:url';
import { defineConfig } from '#q-app/wrappers';
import { inlineIcons } from './vite.icons.ts';
import { websocketOnly } from './vite.websocket.ts';

const ownStyles = fileURLToPath(new URL('./src/css/quasar/index.scss', import.meta.url));
const api = { target: process.env.TAREWELL_DEV_API ?? 'http://127.0.0.1:4681' };

export default defineConfig(() => ({
  boot: ['icons', 'theme', 'problems', 'session', 'live'],
  css: [
    '~@fontsource-variable/atkinson-hyperlegible-next/wght.css',
    '~@fontsource-variable/atkinson-hyperlegible-mono/wght.css',
    '~@fontsource-variable/bricolage-grotesque/wght.css',
    'app.scss',
  ],
  framework: {
    autoImportComponentCase: 'pascal',
    plugins: ['Dark', 'Notify'],
  },
  build: {
    target: { browser: ['es2022', 'firefox115', 'chrome115', 'safari16'], node: 'node20' },
    vueRouterMode: 'history',
    vueOptionsAPI: false,
    distDir: 'dist/spa',
    typescript: { strict: true, vueShim: false },
    vitePlugins: [inlineIcons(), websocketOnly()],
    extendViteConf: () => ({
      // In pieces, so that a worker too loads a part only when it needs it.
      worker: { format: 'es' as const },
      // The first file lists all others: crumbs of a few lines go into a neighbour, and names are short.
      build: {
        rollupOptions: {
          output: { experimentalMinChunkSize: 2_000, chunkFileNames: 'assets/[hash].js' },
        },
      },
    }),
    alias: { 'quasar/dist/quasar.sass': ownStyles },
  },
  devServer: {
    host: '127.0.0.1',
    port: Number(process.env.TAREWELL_DEV_PORT ?? 4682),
    open: false,
    proxy: {
      '/api': api,
      '/healthz': api,
      '/socket.io': { ...api, ws: true },
    },
  },
}));
