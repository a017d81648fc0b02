import { mkdtempSync, realpathSync, rmSync, writeFileSync } from 'node:fs';
import { readFile, readdir } from 'node:fs/promises';
import path from 'node:path';
import { gzipSync } from 'node:zlib';
import { quasar, transformAssetUrls } from '@quasar/vite-plugin';
import vue from '@vitejs/plugin-vue';
import { chromium } from 'playwright-core';
import { build } from 'vite';
import { browserFlags } from '#tests/support/browserFlags.ts';
import { withGround, type BenchResult, type Ground } from './ground.ts';

const most = 1.6;
const project = path.join(import.meta.dirname, '..', '..');

const gzipped = (bytes: Buffer) => gzipSync(bytes, { level: 9 }).length;

/** Script and style that a browser loads until the sheet stands, gzipped, in bytes. */
async function sheetBytes(ground: Ground): Promise<number> {
  const browser = await chromium.launch({
    executablePath: '/usr/bin/chromium',
    args: browserFlags,
  });
  try {
    const context = await browser.newContext({ baseURL: ground.origin });
    const [name = '', value = ''] = (
      await ground.signIn(ground.seeded.members[0]?.email ?? '')
    ).split('=');
    await context.addCookies([{ name, value, url: ground.origin }]);
    const page = await context.newPage();
    let bytes = 0;
    const counted: Promise<void>[] = [];
    page.on('response', (response) => {
      if (!/\.(js|css)(\?|$)/.test(response.url())) return;
      counted.push(
        response.body().then((body) => {
          bytes += gzipped(body);
        }),
      );
    });
    await page.goto(`/c/${ground.seeded.slug}/buys/${ground.seeded.buyId}/sheet`);
    await page.waitForSelector('[role="grid"]');
    await page.waitForLoadState('networkidle');
    await Promise.all(counted);
    return bytes;
  } finally {
    await browser.close();
  }
}

const minimalApp = `
import '@fontsource-variable/atkinson-hyperlegible-next/wght.css';
import 'quasar/src/css/index.sass';
import { createPinia, defineStore } from 'pinia';
import { Notify, QBtn, QHeader, QInput, QLayout, QMarkupTable, QPage, QPageContainer, QToolbar, QToolbarTitle, Quasar } from 'quasar';
import { createApp, defineComponent, h, ref } from 'vue';
import { createRouter, createWebHistory, RouterView } from 'vue-router';
const useNames = defineStore('names', () => ({ names: ref(['Noor', 'Pim']) }));
const Page = defineComponent(() => {
  const store = useNames();
  const name = ref('');
  const save = () => {
    store.names.push(name.value);
    Notify.create('Saved');
  };
  return () => h(QPage, { padding: true }, () => [
    h(QInput, { label: 'Name', modelValue: name.value, 'onUpdate:modelValue': (to) => { name.value = to; } }),
    h(QBtn, { label: 'Save', color: 'primary', onClick: save }),
    h(QMarkupTable, () => [h('tbody', store.names.map((one) => h('tr', [h('td', one)])))]),
  ]);
});
const App = defineComponent(() => () => h(QLayout, { view: 'hHh lpR fFf' }, () => [
  h(QHeader, () => h(QToolbar, () => h(QToolbarTitle, () => 'Names'))),
  h(QPageContainer, () => h(RouterView)),
]));
createApp(App)
  .use(Quasar, { plugins: { Notify } })
  .use(createPinia())
  .use(createRouter({ history: createWebHistory(), routes: [{ path: '/', component: Page }] }))
  .mount('#app');
`;

/**
 * Script and style of a minimal Quasar page, gzipped, in bytes: router with one route, a Pinia store, QLayout with
 * QHeader, QToolbar and page container, one QPage with a QInput, a QBtn and a QMarkupTable, the Notify plugin,
 * Quasar's own stylesheet and the faces of one font family. Built by Quasar's Vite plugin for the same browsers,
 * so that only the parts named are in it.
 */
async function minimalBytes(): Promise<number> {
  // Inside the project, so that packages are found.
  const root = mkdtempSync(
    path.join(realpathSync(path.join(project, 'node_modules')), '.minimal-'),
  );
  try {
    writeFileSync(path.join(root, 'main.ts'), minimalApp);
    writeFileSync(
      path.join(root, 'index.html'),
      '<!doctype html><div id="app"></div><script type="module" src="/main.ts"></script>',
    );
    await build({
      root,
      configFile: false,
      logLevel: 'error',
      plugins: [vue({ template: { transformAssetUrls } }), quasar()],
      build: {
        outDir: 'out',
        target: ['es2022', 'firefox115', 'chrome115', 'safari16'],
        assetsInlineLimit: 0,
      },
    });
    const assets = path.join(root, 'out', 'assets');
    const sizes = await Promise.all(
      (await readdir(assets))
        .filter((file) => /\.(js|css)$/.test(file))
        .map(async (file) => gzipped(await readFile(path.join(assets, file)))),
    );
    return sizes.reduce((sum, size) => sum + size, 0);
  } finally {
    rmSync(root, { recursive: true, force: true });
  }
}

const kb = (bytes: number) => `${(bytes / 1024).toFixed(1)} KB`;

/** First load of the sheet (script and style, gzip) beside a minimal Quasar page built in the same run. */
export async function run(): Promise<BenchResult[]> {
  const ours = await withGround({ members: 200, lines: 20 }, sheetBytes);
  const minimal = await minimalBytes();
  const ratio = ours / minimal;
  return [
    {
      name: 'first load of the sheet, JS and CSS gzip',
      figures: `${kb(ours)} against ${kb(minimal)} of a minimal Quasar page`,
      ratio,
      target: `at most ${most} times`,
      ok: ratio <= most,
    },
  ];
}
