import { config } from '@vue/test-utils';
import { Dialog, Notify, Quasar } from 'quasar';
import iconSet from 'quasar/icon-set/svg-mdi-v7.js';

// Every component test mounts inside Quasar, as the app does.
config.global.plugins.unshift([Quasar, { plugins: { Dialog, Notify }, iconSet }]);
