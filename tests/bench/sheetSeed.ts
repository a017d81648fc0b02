/** Fills a database for the benchmarks of the sheet and says on stdout what is in it. */
import { migrate } from '#server/config/migrate.ts';
import { pool, sequelize } from '#server/config/database.ts';
import { makeBigSheet } from '#tests/support/bigSheet.ts';

/** What the benchmarks know of the seeded sheet. */
export type SeededSheet = {
  slug: string;
  buyId: string;
  lineIds: string[];
  members: { id: string; email: string }[];
};

await migrate(sequelize);
const { slug, buy, lines, members } = await makeBigSheet({
  members: Number(process.env.BENCH_MEMBERS ?? 200),
  lines: Number(process.env.BENCH_LINES ?? 20),
});
const seeded: SeededSheet = {
  slug,
  buyId: buy.id,
  lineIds: lines.map(({ id }) => id),
  members: members.map(({ membership, email }) => ({ id: membership.id, email })),
};
process.stdout.write(`${JSON.stringify(seeded)}\n`);
await sequelize.close();
await pool.end();
