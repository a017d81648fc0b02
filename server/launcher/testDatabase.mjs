// A throw-away PostgreSQL to develop against: prints its URL and lives until Ctrl-C.
import { runCommand } from './command.mjs';
import { startThrowAway } from './postgres/throwAway.mjs';
import { say } from './steps.mjs';

await runCommand(async () => {
  say(await startThrowAway());
  await new Promise(() => setInterval(() => {}, 2 ** 30));
});
