import * as icons from '@quasar/extras/mdi-v7';
import type { Plugin } from 'vite';

const from = /import\s*\{([^}]*)\}\s*from\s*['"]@quasar\/extras\/mdi-v7['"];?/g;

/** One name of an import, `mdiPlus` or `mdiPlus as plus`, as the constant that it stands for. */
function constant(name: string): string {
  const [icon = '', local = icon] = name.split(/\s+as\s+/);
  const path = (icons as Record<string, string>)[icon];
  if (!path) throw new Error(`There is no icon ${icon}.`);
  return `const ${local} = ${JSON.stringify(path)};`;
}

/**
 * Writes each icon's path where it is imported. All icons are one module of their package, so that the first
 * page to load would otherwise carry those of every page.
 */
export const inlineIcons = (): Plugin => ({
  name: 'tarewell-inline-icons',
  apply: 'build',
  enforce: 'post',
  transform: (code) => {
    if (!code.includes('@quasar/extras/mdi-v7')) return;
    const written = code.replace(from, (_, names: string) =>
      names
        .split(',')
        .map((name) => name.trim())
        .filter((name) => name !== '')
        .map(constant)
        .join(' '),
    );
    return { code: written, map: null };
  },
});
