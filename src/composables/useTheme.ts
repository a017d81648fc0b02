import { Dark } from 'quasar';
import { computed } from 'vue';

const KEY = 'tarewell.theme';

export type ThemeChoice = 'auto' | 'light' | 'dark';

/** The kept choice in Quasar's terms: `auto` follows the system. */
export function readThemeChoice(): boolean | 'auto' {
  const kept = localStorage.getItem(KEY);
  if (kept === 'dark') return true;
  if (kept === 'light') return false;
  return 'auto';
}

/** Light, dark or as the system, kept on this device. */
export function useTheme() {
  const choice = computed<ThemeChoice>({
    get: () => (Dark.mode === 'auto' ? 'auto' : Dark.mode ? 'dark' : 'light'),
    set: (value) => {
      if (value === 'auto') localStorage.removeItem(KEY);
      else localStorage.setItem(KEY, value);
      Dark.set(value === 'auto' ? 'auto' : value === 'dark');
    },
  });
  return { choice, isDark: computed(() => Dark.isActive) };
}
