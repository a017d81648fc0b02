import { defineBoot } from '#q-app/wrappers';
import { IconSet, type QuasarIconSet } from 'quasar';
import { icons } from 'src/boot/iconSet.ts';

export default defineBoot(() => {
  // The rest stays as Quasar has it, for parts that aren't in use.
  IconSet.set(icons as QuasarIconSet);
});
