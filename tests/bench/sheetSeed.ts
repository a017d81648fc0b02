/** Fills a database for the benchmarks of the sheet and says on stdout what is in it. */
import { migrate } from '#server/config/migrate.ts';
import { execute, pool, sequelize, transact } from '#server/config/database.ts';
import { Buy } from '#server/models/Buy.ts';
import { Line } from '#server/models/Line.ts';
import { makeBigSheet } from '#tests/support/bigSheet.ts';

/** What the benchmarks know of the seeded sheet. */
export type SeededSheet = {
  slug: string;
  buyId: string;
  lineIds: string[];
  members: { id: string; email: string }[];
  /** Further buys of the club with one line each. */
  small: { buyId: string; lineId: string }[];
};

await migrate(sequelize);
const { slug, buy, lines, members } = await makeBigSheet({
  members: Number(process.env.BENCH_MEMBERS ?? 200),
  lines: Number(process.env.BENCH_LINES ?? 20),
});
const small: SeededSheet['small'] = [];
for (let count = 0; count < Number(process.env.BENCH_SMALL ?? 0); count += 1) {
  const { clubId, responsibleId, openedAt, closesAt } = buy;
  const terms = { clubId, responsibleId, openedAt, closesAt, state: 'open' as const };
  const own = await Buy.create({ ...terms, name: `Small buy ${count + 1}` });
  const line = await Line.create({ buyId: own.id, saltId: 'K2SO4', position: 0 });
  await transact((tx) =>
    execute(
      `insert into line_offers (line_id, offer_id) select :lineId, id from offers where salt_id = 'K2SO4'`,
      { lineId: line.id },
      tx,
    ),
  );
  small.push({ buyId: own.id, lineId: line.id });
}
const seeded: SeededSheet = {
  small,
  slug,
  buyId: buy.id,
  lineIds: lines.map(({ id }) => id),
  members: members.map(({ membership, email }) => ({ id: membership.id, email })),
};
process.stdout.write(`${JSON.stringify(seeded)}\n`);
await sequelize.close();
await pool.end();
