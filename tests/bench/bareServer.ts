/** What the benchmarks measure against: Express and pg, and nothing else. */
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import express from 'express';
import pg from 'pg';

const pool = new pg.Pool({ connectionString: process.env.DATABASE_URL ?? '', max: 10 });
const app = express();

app.get('/sheet', async (_req, res) => {
  const { rows } = await pool.query<{ body: string }>({
    name: 'bare-sheet',
    text: 'select body from bench_sheet where id = $1',
    values: [1],
  });
  res.type('json').send(rows[0]?.body ?? '');
});

/** One update (of a row that many may share: the buy's counter) and one insert, in one transaction. */
app.put('/pledges/:row', express.json(), async (req, res) => {
  const { wantedMg } = req.body as { wantedMg: number };
  const client = await pool.connect();
  try {
    await client.query('begin');
    const { rows } = await client.query<{ version: number }>({
      name: 'bare-update',
      text: 'update bench_rows set version = version + 1, wanted_mg = $2 where id = $1 returning version',
      values: [req.params.row, wantedMg],
    });
    await client.query({
      name: 'bare-insert',
      text: 'insert into bench_changes (row_id, wanted_mg) values ($1, $2)',
      values: [req.params.row, wantedMg],
    });
    await client.query('commit');
    res.json({ version: rows[0]?.version });
  } catch (error) {
    await client.query('rollback');
    throw error;
  } finally {
    client.release();
  }
});

const server = createServer(app);
server.listen(0, '127.0.0.1', () => {
  const { port } = server.address() as AddressInfo;
  process.stdout.write(`http://127.0.0.1:${port}\n`);
});
process.on('SIGTERM', () => process.exit(0));
