import { cleanup } from '@testing-library/vue';
import { config } from '@vue/test-utils';
import { Notify, Quasar } from 'quasar';
import iconSet from 'quasar/icon-set/svg-mdi-v7.js';
import { afterEach } from 'vitest';

// Every component test mounts inside Quasar, as the app does, and leaves the page empty.
config.global.plugins.unshift([Quasar, { plugins: { Notify }, iconSet }]);
afterEach(cleanup);
