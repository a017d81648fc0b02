import { Sequelize } from 'sequelize';
import { migrate } from '#server/config/migrate.ts';

const template = 'tarewell_template';

/** Migrates one template database; each test file then works on its own copy of it. */
export default async function setup(): Promise<void> {
  const url = process.env.TEST_DATABASE_URL;
  if (!url) throw new Error('TEST_DATABASE_URL is not set: run the tests with `npm test`.');
  const admin = new Sequelize(url, { dialect: 'postgres', logging: false });
  // Several runs on one cluster wait for each other here.
  await admin.transaction(async (transaction) => {
    await admin.query('select pg_advisory_xact_lock(468)', { transaction });
    const name = `${template}_${process.pid}`;
    await admin.query(`create database ${name}`);
    const target = new URL(url);
    target.pathname = `/${name}`;
    const database = new Sequelize(target.href, { dialect: 'postgres', logging: false });
    await migrate(database);
    await database.close();
    process.env.TEST_TEMPLATE = name;
  });
  await admin.close();
}

/** Drops the template of this run. */
export async function teardown(): Promise<void> {
  const url = process.env.TEST_DATABASE_URL;
  if (!url || !process.env.TEST_TEMPLATE) return;
  const admin = new Sequelize(url, { dialect: 'postgres', logging: false });
  await admin.query(`drop database if exists ${process.env.TEST_TEMPLATE} with (force)`);
  await admin.close();
}
