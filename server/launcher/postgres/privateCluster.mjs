import { existsSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { LauncherProblem } from '../problem.mjs';
import { say } from '../steps.mjs';
import {
  createCluster,
  findPostmaster,
  makePassword,
  startCluster,
  stopCluster,
  superuser,
  urlOf,
} from './cluster.mjs';
import { placeFor } from './place.mjs';
import { quoteText, sql } from './sql.mjs';

/** Name of the application's database, and of the role that owns it. */
export const appName = 'tarewell';

const recordOf = (dataFolder) => join(dataFolder, 'pg.json');

function readRecord(dataFolder) {
  const file = recordOf(dataFolder);
  return existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : null;
}

function writeRecord(dataFolder, record) {
  const file = recordOf(dataFolder);
  writeFileSync(`${file}.next`, JSON.stringify(record, null, 2), { mode: 0o600 });
  renameSync(`${file}.next`, file);
}

// A cluster outside the data folder does not travel with it: a moved folder keeps it, a copied one must not share it.
function followMove(dataFolder, record) {
  if (record.dataFolder === dataFolder) return record;
  if (record.place === null) return { ...record, dataFolder };
  if (existsSync(recordOf(record.dataFolder))) {
    throw new LauncherProblem(
      `${dataFolder} is a copy of ${record.dataFolder}, whose database lies in ${record.place}.\n` +
        `To copy data, use "npm run backup" there and "npm run restore" here. ` +
        `To begin afresh, delete ${recordOf(dataFolder)}.`,
    );
  }
  return { ...record, dataFolder };
}

async function makeRecord(dataFolder) {
  const place = placeFor(dataFolder);
  const inside = place.startsWith(dataFolder);
  if (existsSync(place)) {
    if (inside) {
      throw new LauncherProblem(
        `${place} holds a database, but ${recordOf(dataFolder)} with its password is missing. ` +
          'Put that file back, or move the database folder away to begin afresh.',
      );
    }
    await setAside(place);
  }
  const record = {
    dataFolder,
    place: inside ? null : place,
    port: null,
    ownerPassword: makePassword(),
    password: makePassword(),
  };
  writeRecord(dataFolder, record);
  return record;
}

// What a deleted data folder of the same path left under /var/lib.
async function setAside(place) {
  await stopCluster(place);
  const aside = `${place}.left-${new Date().toISOString().replace(/\W/g, '').slice(0, 14)}`;
  renameSync(place, aside);
  say(`The database of an earlier, deleted data folder was set aside as ${aside}.`);
}

async function ensureDatabase(admin, password) {
  const found = await sql(admin, `select datname from pg_database where datname = '${appName}'`);
  if (found) return;
  const role = await sql(admin, `select rolname from pg_roles where rolname = '${appName}'`);
  if (!role) await sql(admin, `create role ${appName} login password ${quoteText(password)}`);
  await sql(admin, `create database ${appName} owner ${appName}`);
}

/**
 * Starts the PostgreSQL of a data folder, made at the first start. The caller holds the folder's lock.
 * @returns `{ url, ownerUrl, stop, reused }`: the application's URL, and the superuser's to the maintenance database
 */
export async function startPrivateCluster(dataFolder) {
  const kept = readRecord(dataFolder);
  const record = kept ? followMove(dataFolder, kept) : await makeRecord(dataFolder);
  const folder = record.place ?? join(dataFolder, 'postgres');
  if (!existsSync(folder)) await createCluster(folder, record.ownerPassword);
  const { port, reused } = await startCluster(folder, {
    port: record.port,
    password: record.ownerPassword,
  });
  if (port !== record.port || record !== kept) writeRecord(dataFolder, { ...record, port });
  const ownerUrl = urlOf({
    port,
    user: superuser,
    password: record.ownerPassword,
    database: 'postgres',
  });
  await ensureDatabase(ownerUrl, record.password);
  const url = urlOf({ port, user: appName, password: record.password, database: appName });
  return { url, ownerUrl, reused };
}

/** Stops the PostgreSQL of a data folder, if it runs. */
export async function stopPrivateCluster(dataFolder) {
  const record = readRecord(dataFolder);
  if (record) await stopCluster(record.place ?? join(dataFolder, 'postgres'));
}

/** @returns the superuser's and the application's URL of a cluster that runs now, or null */
export function findRunningCluster(dataFolder) {
  const record = readRecord(dataFolder);
  const running = record && findPostmaster(record.place ?? join(dataFolder, 'postgres'));
  if (!running) return null;
  const { port } = running;
  return {
    url: urlOf({ port, user: appName, password: record.password, database: appName }),
    ownerUrl: urlOf({
      port,
      user: superuser,
      password: record.ownerPassword,
      database: 'postgres',
    }),
  };
}
