import { existsSync, readFileSync, readdirSync } from 'node:fs';
import path from 'node:path';
import { preprocessCSS, resolveConfig } from 'vite';
import { beforeAll, describe, expect, it } from 'vitest';
import { icons } from 'src/boot/iconSet.ts';

const project = path.join(import.meta.dirname, '..', '..', '..');
const quasar = path.join(project, 'node_modules/quasar/src');
const own = path.join(project, 'src/css/quasar/index.scss');

function filesIn(folder: string, pattern: RegExp): string[] {
  return readdirSync(folder, { withFileTypes: true, recursive: true })
    .filter((entry) => entry.isFile() && pattern.test(entry.name))
    .map((entry) => path.join(entry.parentPath, entry.name));
}

const read = (file: string) => readFileSync(file, 'utf8');
const sources = filesIn(path.join(project, 'src'), /\.(vue|ts)$/);

/** What the app takes from Quasar by name: parts in templates, plugins and directives in scripts. */
function namesUsed(): Set<string> {
  const names = new Set(['Dark', 'Notify', 'Ripple', 'ClosePopup']);
  for (const file of sources) {
    for (const [, name = ''] of read(file).matchAll(/<(Q[A-Z]\w+)/g)) names.add(name);
  }
  return names;
}

/** Quasar's modules behind those names, with all that they import. */
function modulesUsed(): Set<string> {
  const names = namesUsed();
  const todo = filesIn(quasar, /\.js$/).filter((file) => names.has(path.basename(file, '.js')));
  const seen = new Set<string>();
  for (let file = todo.pop(); file; file = todo.pop()) {
    if (seen.has(file)) continue;
    seen.add(file);
    for (const [, from = ''] of read(file).matchAll(/from ['"](\.[^'"]+)['"]/g)) {
      const target = path.resolve(path.dirname(file), from);
      if (existsSync(target)) todo.push(target);
    }
  }
  return seen;
}

const quiet = {
  quietDeps: true,
  silenceDeprecations: ['import' as const, 'global-builtin' as const],
};
const settings = {
  configFile: false as const,
  root: project,
  css: { preprocessorOptions: { scss: quiet, sass: quiet } },
};

async function classesOf(file: string, code = read(file)): Promise<Set<string>> {
  const config = await resolveConfig(settings, 'build');
  const { code: css } = await preprocessCSS(code, file, config);
  return new Set([...css.matchAll(/\.(-?[a-z][\w-]*)/gi)].map(([, name = '']) => name));
}

/** Words that are also the names of classes, and classes of what this app never shows. */
const otherwise = new Set([
  // Sizes of a part.
  ...['xs', 'sm', 'md', 'lg', 'xl'],
  // The cards that a table draws by itself; ours draws its own.
  ...['col-xs-12', 'col-sm-6', 'col-md-4', 'col-lg-3'],
  // Styled by itself only in a drawer.
  'q-item__section',
]);

describe("the app's own set of icons", () => {
  it('has every icon that the parts in use draw', () => {
    const asked = [...modulesUsed()].flatMap((file) =>
      [...read(file).matchAll(/\$q\.iconSet\.(?!set\b)([a-z]+)(?:\.([a-z]+))?/gi)].map(
        ([, group = '', name]) => ({ group, name }),
      ),
    );
    expect(asked.length).toBeGreaterThan(10);
    const missing = asked.filter(({ group, name }) => {
      const found = (icons as Record<string, unknown>)[group];
      return typeof found !== 'object' || !found || (name !== undefined && !(name in found));
    });
    expect(missing).toEqual([]);
  });
});

describe("the app's choice of Quasar's styles", () => {
  let parts: Set<string>;
  let whole: Set<string>;
  let chosen: Set<string>;

  beforeAll(async () => {
    parts = modulesUsed();
    const everything = path.join(quasar, 'css/index.sass');
    [whole, chosen] = await Promise.all([classesOf(everything), classesOf(own)]);
  }, 60_000);

  it('has the stylesheet of every part in use', () => {
    const listed = read(own);
    const missing = [...parts]
      .map((file) => file.replace(/\.js$/, '.sass'))
      .filter((file) => existsSync(file))
      .map((file) => path.relative(quasar, file))
      .filter((file) => !listed.includes(file));
    expect(missing).toEqual([]);
  });

  it('has every class of Quasar that those parts or the app put on an element', () => {
    expect(whole.size).toBeGreaterThan(1_500);
    const missing: string[] = [];
    for (const file of [...parts, ...sources]) {
      const words = read(file)
        .replace(/<style[\s\S]*<\/style>|^import .*$|\/\/.*$/gm, '')
        .matchAll(/(?<=['"` ])[a-z][\w-]*(?=['"` ])/g);
      for (const [word] of words) {
        if (!whole.has(word) || chosen.has(word) || otherwise.has(word)) continue;
        missing.push(`${word} in ${path.relative(project, file)}`);
      }
    }
    expect(missing).toEqual([]);
  });

  it('is a good deal smaller than the whole', () => {
    expect(chosen.size).toBeLessThan(whole.size / 2);
  });
});
