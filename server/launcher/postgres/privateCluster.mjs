import { randomBytes } from 'node:crypto';
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

const folderOf = (dataFolder, record) => record.place ?? join(dataFolder, 'postgres');

// A cluster outside notes whose it is, so that a new folder of the same path takes only what nobody else has.
const noteOf = (place) => join(place, 'data-folder');

async function choosePlace(dataFolder) {
  const place = placeFor(dataFolder);
  if (!existsSync(place)) return place;
  if (place.startsWith(dataFolder)) {
    throw new LauncherProblem(
      `${place} holds a database, but ${recordOf(dataFolder)} with its password is missing. ` +
        'Put that file back, or move the database folder away to begin afresh.',
    );
  }
  const note = noteOf(place);
  if (!existsSync(note) || readFileSync(note, 'utf8') !== dataFolder) {
    return `${place}-${randomBytes(4).toString('hex')}`;
  }
  await stopCluster(place);
  const aside = `${place}.left-${randomBytes(4).toString('hex')}`;
  renameSync(place, aside);
  say(`The database that a deleted data folder had left here was set aside as ${aside}.`);
  return place;
}

async function makeRecord(dataFolder) {
  const place = await choosePlace(dataFolder);
  const record = {
    dataFolder,
    place: place.startsWith(dataFolder) ? null : place,
    port: null,
    ownerPassword: makePassword(),
    password: makePassword(),
  };
  writeRecord(dataFolder, record);
  return record;
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
  const folder = folderOf(dataFolder, record);
  if (!existsSync(folder)) await createCluster(folder, record.ownerPassword);
  if (record.place) writeFileSync(noteOf(record.place), dataFolder);
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
  if (record) await stopCluster(folderOf(dataFolder, record));
}

/** @returns the superuser's and the application's URL of a cluster that runs now, or null */
export function findRunningCluster(dataFolder) {
  const record = readRecord(dataFolder);
  const running = record && findPostmaster(folderOf(dataFolder, record));
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
