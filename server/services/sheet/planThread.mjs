// A thread doesn't inherit the loader of its parent, so it brings its own before it reads TypeScript.
import { register } from 'tsx/esm/api';

register();
await import('./planWorker.ts');
