// `npm run restore FILE`: all of a backup or nothing of it.
import { existsSync, mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { openDatabase } from './applicationDatabase.mjs';
import { keptHere, readNote } from './backupFile.mjs';
import { onEnd, runCommand } from './command.mjs';
import { ensureDebianPackages } from './machine.mjs';
import { countTables, restoreAside } from './postgres/restoreAside.mjs';
import { LauncherProblem } from './problem.mjs';
import { asTyped, dataFolder, inProject } from './project.mjs';
import { addUploads, finishFiles } from './restoreFiles.mjs';
import { say, step } from './steps.mjs';
import { tar } from './tar.mjs';

function readArguments() {
  const words = process.argv.slice(2);
  const [name] = words.filter((word) => word !== '--force');
  if (!name) throw new LauncherProblem('Say what to restore: npm run restore FILE');
  const file = asTyped(name);
  if (!existsSync(file)) throw new LauncherProblem(`There is no file ${file}.`);
  // Without `--` before it, npm keeps the word for itself.
  const force = words.includes('--force') || process.env.npm_config_force === 'true';
  return { file, force };
}

async function unpack(file) {
  const folder = mkdtempSync(join(dataFolder, 'restore-'));
  onEnd(() => rmSync(folder, { recursive: true, force: true }));
  await tar(['-xf', file, '-C', folder, '--no-same-owner'], `${file} is no backup of Tarewell`);
  return { folder, note: readNote(folder) };
}

function refuseLaterSchema(migrations) {
  const known = new Set(
    readdirSync(inProject('server/migrations')).map((name) => name.replace(/\.ts$/, '')),
  );
  const unknown = migrations.find((name) => !known.has(name));
  if (unknown) {
    throw new LauncherProblem(
      `This backup was made by a later version (${unknown}). Update this one first.`,
    );
  }
}

await runCommand(async () => {
  const { file, force } = readArguments();
  const { url, ownerUrl } = await openDatabase('npm run restore', ensureDebianPackages);
  const tables = await countTables(url);
  if ((tables > 0 || keptHere().includes('uploads')) && !force) {
    throw new LauncherProblem(
      `The database holds data already (${tables} tables). Nothing was changed. ` +
        `To replace it: npm run restore -- ${file} --force`,
    );
  }
  const { folder, note } = await unpack(file);
  let aside;
  await step('Restoring the database beside the present one', async () => {
    aside = await restoreAside({ url, ownerUrl, folder });
    refuseLaterSchema(aside.migrations);
  });
  await step('Putting both in place', async () => {
    // Files are named once and never changed, so more of them than the database knows do no harm: added before the
    // database is swapped in one transaction, removed after it.
    addUploads(folder);
    await aside.swap();
    finishFiles(folder);
  });
  const replaced = tables > 0 ? ' The earlier data was removed.' : '';
  say(`Restored the backup of ${note.madeAt}: ${aside.tables} tables.${replaced}`);
});
