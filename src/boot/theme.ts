import { defineBoot } from '#q-app/wrappers';
import { Dark } from 'quasar';
import { watch } from 'vue';
import { readThemeChoice } from 'src/composables/useTheme.ts';

export default defineBoot(() => {
  Dark.set(readThemeChoice());
  watch(
    () => Dark.isActive,
    (dark) => {
      document.documentElement.dataset.mode = dark ? 'dark' : 'light';
    },
    { immediate: true },
  );
});
