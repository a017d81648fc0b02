import { randomUUID } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { shareOut } from '#shared/domain/shares/shareOut.ts';
import { bagHoldsMg, reconcileBags } from '#shared/domain/splits/bagSums.ts';
import { execute, select, transact } from '#server/config/database.ts';
import { closeBag, noteLine } from '#server/services/splits/closeBag.ts';
import { cutIntoParts } from '#server/services/splits/cutPortion.ts';
import { finalOf } from '#server/services/splits/finalOf.ts';
import { finishSplitting } from '#server/services/splits/finishSplitting.ts';
import { keepWeighing } from '#server/services/splits/keepWeighing.ts';
import { noteSpill } from '#server/services/splits/noteSpill.ts';
import { previewFinal } from '#server/services/splits/previewFinal.ts';
import { startSplitting } from '#server/services/splits/startSplitting.ts';
import { takeExcess } from '#server/services/splits/takeExcess.ts';
import { undoWeighing } from '#server/services/splits/undoWeighing.ts';
import { voidPortion } from '#server/services/splits/voidPortion.ts';
import { accountSum, booksOf, type LockedWorld } from '#tests/support/locked.ts';
import {
  actorFor,
  arriveAll,
  billAll,
  makeOrderedWorld,
  makeTargets,
  shelfOf,
  splitOf,
  weighingOf,
} from '#tests/support/splitWorld.ts';

/** What happens to one portion, and to one bag when it is closed. */
const fate = fc.record({
  act: fc.constantFrom('weigh', 'weigh', 'weigh', 'undo', 'cut', 'void', 'twice'),
  /** Reading against the target, in tenths of a per cent. */
  off: fc.integer({ min: -30, max: 5 }),
});
const history = fc.record({
  nets: fc.array(fc.integer({ min: 800, max: 1010 }), { minLength: 2, maxLength: 2 }),
  fates: fc.array(fate, { minLength: 5, maxLength: 5 }),
  spills: fc.array(fc.nat({ max: 900_000 }), { minLength: 2, maxLength: 2 }),
  left: fc.array(fc.integer({ min: 900, max: 1010 }), { minLength: 2, maxLength: 2 }),
  billedMore: fc.integer({ min: -900, max: 900 }),
  takes: fc.boolean(),
  payer: fc.constantFrom('members', 'shelf'),
});
type History = typeof history extends fc.Arbitrary<infer T> ? T : never;

async function weighAll(world: LockedWorld, { fates }: History): Promise<void> {
  const helper = await actorFor(world, world.people.helper);
  const own = await actorFor(world, world.people.own);
  const first = await splitOf(world);
  for (const [index, { id, version, targetMg }] of first.portions.entries()) {
    const { act, off } = fates[index] ?? { act: 'weigh', off: 0 };
    if (act === 'void') {
      await voidPortion(own, id, { version, reason: 'Left the club.' });
      continue;
    }
    if (act === 'cut') {
      await cutIntoParts(helper, id, { version, capacityMg: Math.ceil(targetMg / 2000) * 1000 });
    }
    const split = await splitOf(world);
    const parts = split.portions.filter(
      ({ lineId, member, state }) =>
        lineId === first.portions[index]?.lineId &&
        member.membershipId === first.portions[index].member.membershipId &&
        state === 'waiting',
    );
    for (const part of parts) {
      const readingMg = Math.max(1, part.targetMg + Math.trunc((part.targetMg * off) / 1000));
      const weighing = weighingOf(split, part, { readingMg, secondLook: true });
      await keepWeighing(helper, weighing);
      if (act === 'twice') await keepWeighing(helper, weighing);
      if (act === 'undo') {
        await undoWeighing(own, weighing.id);
        await keepWeighing(helper, { ...weighing, id: randomUUID() });
      }
    }
  }
}

async function closeAll(world: LockedWorld, { spills, left }: History): Promise<void> {
  const helper = await actorFor(world, world.people.helper);
  const own = await actorFor(world, world.people.own);
  for (const [index, bag] of (await splitOf(world)).bags.entries()) {
    const mg = Math.min(spills[index] ?? 0, bagHoldsMg(bag));
    if (mg > 0) await noteSpill(helper, bag.id, { id: randomUUID(), mg, note: '' });
    const holds = bagHoldsMg(bag) - mg;
    await closeBag(helper, bag.id, {
      version: bag.version,
      shelfMg: Math.trunc((holds * (left[index] ?? 1000)) / 1000),
      tareMg: null,
      unaccountedNote: 'As weighed.',
    });
  }
  const split = await splitOf(world);
  for (const line of split.lines) {
    const sums = reconcileBags(split.bags.filter(({ lineId }) => lineId === line.id));
    expect(sums.portionsMg + sums.shelfMg + sums.spilledMg + sums.unaccountedMg).toBe(sums.netMg);
    if (sums.needsNote) await noteLine(own, line.id, { note: 'As weighed.' });
  }
}

async function live(story: History): Promise<void> {
  const world = await makeOrderedWorld();
  await transact((tx) =>
    execute(
      `update snapshots set terms = jsonb_set(terms, '{leftOverPayer}', to_jsonb(:payer::text))
       where buy_id = :buyId and terms is not null`,
      { buyId: world.buy.id, payer: story.payer },
      tx,
    ),
  );
  const own = await actorFor(world, world.people.own);
  await billAll(world, story.billedMore);
  await arriveAll(world, (bag) =>
    Math.trunc((bag.nominalMg * (story.nets[bag.lineId === world.line.id ? 0 : 1] ?? 1000)) / 1000),
  );
  await makeTargets(world);
  await startSplitting(own, world.buy.termsVersion);
  await weighAll(world, story);
  await closeAll(world, story);
  await takeExcess(await actorFor(world, world.people.treasurer), { clubTakesExcess: story.takes });

  const cost = await accountSum(world.club.id, 'buy', world.buy.id);
  const preview = await previewFinal(await actorFor(world, world.people.own));
  expect(preview.blocked).toEqual([]);
  await world.buy.reload();
  const { termsVersion } = world.buy;
  await finishSplitting(own, { termsVersion, basis: preview.basis });

  const final = await finalOf(world.buy.id);
  if (!final) throw new Error('no final share');
  expect(final.sheet).toEqual(shareOut(final.request));
  expect(await accountSum(world.club.id, 'buy', world.buy.id)).toBe(0);
  expect(await booksOf(world.club.id)).toEqual({ sum: 0, unbalanced: 0 });
  const members = await select<{ id: string; minor: number }>(
    'select membership_id as id, final_minor as minor from buy_members where buy_id = :id',
    { id: world.buy.id },
  );
  let shared = 0;
  for (const { id, minor } of members) {
    expect(await accountSum(world.club.id, 'member', id)).toBe(minor);
    shared += minor;
  }
  const losses = await accountSum(world.club.id, 'losses');
  const shelf = await accountSum(world.club.id, 'shelf');
  expect(shared + shelf + losses).toBe(cost);
  const stock = await shelfOf(world.buy.id);
  expect(stock.reduce((sum, row) => sum + row.cost_minor, 0)).toBe(shelf);
  const charged = (await splitOf(world)).portions.reduce((sum, p) => sum + (p.chargedMg ?? 0), 0);
  const paid = final.sheet.members.flatMap(({ lines }) => lines.map(({ mg }) => mg));
  expect(paid.reduce((sum, mg) => sum + mg, 0)).toBe(charged);
}

describe('random splits', () => {
  it('always end with the buy’s account at zero and every sum whole', async () => {
    await fc.assert(fc.asyncProperty(history, live), { numRuns: 6, endOnFailure: true });
  }, 120_000);
});
