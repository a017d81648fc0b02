// `npm run backup FILE`: the database and the uploaded files in one tar file, while the server runs or not.
import { existsSync, mkdtempSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { openDatabase } from './applicationDatabase.mjs';
import { backupFormat, keptHere, parts } from './backupFile.mjs';
import { onEnd, runCommand } from './command.mjs';
import { ensureDebianPackages } from './machine.mjs';
import { findRunningInstallation } from './dataFolderLock.mjs';
import { findRunningCluster } from './postgres/privateCluster.mjs';
import { program } from './postgres/programs.mjs';
import { connectionEnv } from './postgres/sql.mjs';
import { LauncherProblem } from './problem.mjs';
import { lastLines, run } from './processes.mjs';
import { asTyped, dataFolder } from './project.mjs';
import { say, step } from './steps.mjs';
import { tar } from './tar.mjs';

// Signed-in browsers, counters of attempts and messages in flight mean nothing later; a restored session could outlive
// its sign-out.
const fleeting = ['session', 'rate_limits', 'socket_io_attachments'];

async function findDatabase() {
  const running = process.env.DATABASE_URL ? null : findRunningInstallation(dataFolder);
  const cluster = running && findRunningCluster(dataFolder);
  if (cluster) return cluster.url;
  if (!process.env.DATABASE_URL && !existsSync(join(dataFolder, 'pg.json'))) {
    throw new LauncherProblem(`There is nothing to back up in ${dataFolder} yet.`);
  }
  return (await openDatabase('npm run backup', ensureDebianPackages)).url;
}

async function dump(url, file) {
  const without = fleeting.map((table) => `--exclude-table-data=public.${table}`);
  const args = ['--format=custom', '--no-owner', '--no-privileges', ...without, `--file=${file}`];
  const { code, output } = await run(program('pg_dump'), args, { env: connectionEnv(url) });
  if (code !== 0) throw new LauncherProblem(`pg_dump failed:\n${lastLines(output, 5)}`);
}

function prepareFolder(target) {
  if (!existsSync(dirname(target))) {
    throw new LauncherProblem(`There is no folder ${dirname(target)}.`);
  }
  // Beside the target: renamed into place when complete.
  const folder = mkdtempSync(join(dirname(target), '.tarewell-backup-'));
  onEnd(() => rmSync(folder, { recursive: true, force: true }));
  return folder;
}

await runCommand(async () => {
  const [name] = process.argv.slice(2);
  if (!name) throw new LauncherProblem('Say where to: npm run backup FILE');
  const target = asTyped(name);
  if (existsSync(target)) throw new LauncherProblem(`${target} exists already.`);
  const url = await findDatabase();
  const folder = prepareFolder(target);
  const note = { program: 'tarewell', format: backupFormat, madeAt: new Date().toISOString() };
  writeFileSync(join(folder, parts.note), JSON.stringify(note, null, 2));
  await step('Backing up the database', () => dump(url, join(folder, parts.dump)));
  const files = keptHere();
  await step('Packing it with the uploaded files', async () => {
    const packed = join(folder, 'backup.tar');
    writeFileSync(packed, '', { mode: 0o600 });
    const here = ['-C', folder, parts.note, parts.dump];
    const data = files.length > 0 ? ['-C', dataFolder, ...files] : [];
    // Uploads that are being written now are not in the dump yet.
    const args = ['-cf', packed, '--exclude=*.part', ...here, ...data];
    await tar(args, 'tar could not pack the backup', [0, 1]);
    renameSync(packed, target);
  });
  if (process.env.S3_BUCKET) say('Files in the S3 store are not in it: back up the bucket too.');
  say(`Backup: ${target} (${(statSync(target).size / 1e6).toFixed(1)} MB). Keep it private.`);
});
