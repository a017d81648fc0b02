import { onMailQueued } from '../services/notices/queueNotice.ts';
import { sendOutbox } from '../services/notices/sendOutbox.ts';
import type { Job } from './index.ts';

let soon: NodeJS.Timeout | undefined;

onMailQueued(() => {
  soon ??= setTimeout(() => {
    soon = undefined;
    void sendMail.run().catch(() => undefined);
  }, 50).unref();
});

/** Sends queued mail: at once when this process queued some, and every few seconds for the rest. */
export const sendMail: Job = {
  name: 'send mail',
  everyMs: 5_000,
  run: async () => {
    await sendOutbox();
  },
};
