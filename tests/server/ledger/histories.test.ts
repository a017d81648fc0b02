import { randomUUID } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { execute, select, transact } from '#server/config/database.ts';
import { DomainProblem } from '#server/services/problem.ts';
import { findBuyActor, findClubActor, type BuyActor } from '#server/services/actors.ts';
import { buyAccountBalance, memberBalances } from '#server/services/ledger/balances.ts';
import { confirmCash } from '#server/services/ledger/confirmCash.ts';
import { findPayments } from '#server/services/ledger/findPayments.ts';
import { owedInClub } from '#server/services/ledger/owed.ts';
import { noteCash, recordPayment } from '#server/services/ledger/recordPayment.ts';
import { refundMember } from '#server/services/ledger/refundMember.ts';
import { reversePayment } from '#server/services/ledger/reversePayment.ts';
import { confirmBill, reverseBill } from '#server/services/orders/confirmBill.ts';
import { enterBill } from '#server/services/orders/enterBill.ts';
import { findBills } from '#server/services/orders/findBills.ts';
import { accountSum, booksOf, makeLockedWorld, type LockedWorld } from '#tests/support/locked.ts';
import type { Person } from '#tests/support/world.ts';

const today = new Date().toISOString().slice(0, 10);

type Act =
  | { act: 'pay' | 'cash' | 'refund'; who: number; amount: number; named: boolean }
  | { act: 'note' | 'bill'; who: number; amount: number }
  | { act: 'confirm' | 'reverse' | 'confirmBill' | 'reverseBill'; pick: number }
  | { act: 'cancel' };

const who = fc.nat(2);
const amount = fc.integer({ min: 1, max: 9000 });
const pick = fc.nat(9);
const acts: fc.Arbitrary<Act[]> = fc.array(
  fc.oneof(
    {
      weight: 4,
      arbitrary: fc.record({
        act: fc.constantFrom('pay' as const, 'cash' as const, 'refund' as const),
        who,
        amount,
        named: fc.boolean(),
      }),
    },
    {
      weight: 2,
      arbitrary: fc.record({ act: fc.constantFrom('note' as const, 'bill' as const), who, amount }),
    },
    {
      weight: 3,
      arbitrary: fc.record({
        act: fc.constantFrom(
          'confirm' as const,
          'reverse' as const,
          'confirmBill' as const,
          'reverseBill' as const,
        ),
        pick,
      }),
    },
    { weight: 1, arbitrary: fc.constant({ act: 'cancel' as const }) },
  ),
  { minLength: 4, maxLength: 18 },
);

/** What each member has paid in less what went back, kept beside the books by the test alone. */
class Model {
  readonly paid: number[] = [0, 0, 0];
  readonly money = { bank: 0, cash: 0, held: 0 };
  readonly undo = new Map<string, () => void>();
  billed = 0;
  cancelled = false;
}

async function actorsOf(world: LockedWorld) {
  const club = async (person: Person) => {
    const actor = await findClubActor(person.account.id, world.club.slug, 'test');
    if (!actor) throw new Error('no actor');
    return actor;
  };
  const treasurer = await club(world.people.treasurer);
  const own = await findBuyActor(await club(world.people.own), world.buy.id);
  const closer = await findBuyActor(treasurer, world.buy.id);
  if (!own || !closer) throw new Error('no actor');
  return { treasurer, own, closer };
}

async function run(world: LockedWorld, list: readonly Act[]): Promise<void> {
  const model = new Model();
  const { treasurer, own, closer } = await actorsOf(world);
  const member = (index: number) => world.payers[index] ?? world.payers[0];
  const idOf = (index: number) => member(index).membership.id;
  for (const step of list) {
    try {
      await act(step);
    } catch (error) {
      // A refusal is an answer; it must have changed nothing, which `check` sees.
      if (!(error instanceof DomainProblem)) throw error;
    }
    await check();
  }

  async function act(step: Act): Promise<void> {
    switch (step.act) {
      case 'pay':
      case 'cash': {
        const payment = await recordPayment(treasurer, {
          key: randomUUID(),
          memberId: idOf(step.who),
          buyId: step.named ? world.buy.id : null,
          method: step.act === 'pay' ? 'transfer' : 'cash',
          amountMinor: step.amount,
          receivedOn: today,
          reference: '',
        });
        const into = step.act === 'pay' ? 'bank' : 'cash';
        change(payment.id, step.who, step.amount, into);
        return;
      }
      case 'note': {
        const payment = await noteCash(own, {
          key: randomUUID(),
          memberId: idOf(step.who),
          amountMinor: step.amount,
          receivedOn: today,
        });
        change(payment.id, step.who, step.amount, 'held');
        return;
      }
      case 'refund': {
        const payment = await refundMember(treasurer, {
          key: randomUUID(),
          memberId: idOf(step.who),
          method: 'transfer',
          amountMinor: step.amount,
          paidOn: today,
          reference: '',
        });
        change(payment.id, step.who, -step.amount, 'bank');
        return;
      }
      case 'confirm': {
        const payments = await findPayments(world.club.id, 'unconfirmed');
        const payment = payments[step.pick % Math.max(1, payments.length)];
        if (!payment) return;
        await confirmCash(treasurer, { paymentIds: [payment.id], receivedOn: today });
        model.money.held -= payment.amountMinor;
        model.money.cash += payment.amountMinor;
        const index = world.payers.findIndex(
          ({ membership }) => membership.id === payment.member.id,
        );
        model.undo.set(payment.id, () => shift(index, -payment.amountMinor, 'cash'));
        return;
      }
      case 'reverse': {
        const ids = [...model.undo.keys()];
        const id = ids[step.pick % Math.max(1, ids.length)];
        if (!id) return;
        await reversePayment(treasurer, id, 'Entered by mistake');
        model.undo.get(id)?.();
        model.undo.delete(id);
        return;
      }
      case 'bill': {
        await enterBill(own, {
          version: 0,
          supplierId: null,
          payee: 'The corner shop',
          number: '',
          billedOn: today,
          goods: [],
          charges: [
            {
              kind: 'bags',
              name: 'Bags',
              amountMinor: step.amount,
              taxRatePpm: 0,
              chargeId: null,
              basis: null,
            },
          ],
          taxMinor: 0,
          paidBy: step.who === 0 ? 'club' : 'member',
          advancedById: step.who === 0 ? null : idOf(step.who),
        });
        return;
      }
      case 'confirmBill':
      case 'reverseBill':
        await settleBill(closer, step.act === 'confirmBill', step.pick);
        return;
      case 'cancel':
        await transact((tx) =>
          execute("update buys set state = 'cancelled' where id = :id", { id: world.buy.id }, tx),
        );
        model.cancelled = true;
    }
  }

  async function settleBill(actor: BuyActor, confirms: boolean, at: number): Promise<void> {
    const bills = await findBills(world.buy.id);
    const bill = bills[at % Math.max(1, bills.length)];
    if (!bill) return;
    if (confirms) await confirmBill(actor, bill.id, { version: bill.version, paidFrom: 'bank' });
    else await reverseBill(actor, bill.id, { version: bill.version, reason: 'Wrong bill' });
    const sum = confirms ? bill.totalMinor : -bill.totalMinor;
    model.billed += sum;
    const index = world.payers.findIndex(({ membership }) => membership.id === bill.advancedById);
    if (index < 0) model.money.bank -= sum;
    else model.paid[index] = (model.paid[index] ?? 0) + sum;
  }

  function shift(index: number, minor: number, where: keyof Model['money']): void {
    model.paid[index] = (model.paid[index] ?? 0) + minor;
    model.money[where] += minor;
  }

  function change(id: string, index: number, minor: number, where: keyof Model['money']): void {
    shift(index, minor, where);
    model.undo.set(id, () => shift(index, -minor, where));
  }

  async function check(): Promise<void> {
    expect(await booksOf(world.club.id)).toEqual({ sum: 0, unbalanced: 0 });
    expect(await accountSum(world.club.id, 'bank')).toBe(model.money.bank);
    expect(await accountSum(world.club.id, 'cash')).toBe(model.money.cash);
    expect(await accountSum(world.club.id, 'cash_held', world.people.own.membership.id)).toBe(
      model.money.held,
    );
    expect(await buyAccountBalance(world.buy.id)).toBe(model.billed);
    const balances = await memberBalances(world.club.id);
    const owed = await owedInClub(world.club.id);
    world.payers.forEach((person, index) => {
      const id = person.membership.id;
      const paid = model.paid[index] ?? 0;
      expect(balances.get(id) ?? 0).toBe(0 - paid);
      const due = model.cancelled ? 0 : world.dueOf(person);
      const standing = owed.get(id);
      const open = standing?.openMinor ?? 0;
      const credit = standing?.creditMinor ?? 0;
      const carried = standing?.carriedMinor ?? 0;
      expect(open + carried - credit).toBe(due - paid);
      expect(Math.min(open + carried, credit)).toBe(0);
    });
  }
}

describe('random histories of a club, through the services', () => {
  it('keep the books balanced, and every balance equal to what is owed', async () => {
    await fc.assert(
      fc.asyncProperty(acts, async (list) => run(await makeLockedWorld(), list)),
      { numRuns: 60, endOnFailure: true },
    );
  }, 240_000);

  it('never refund more than there is, however many try at once', async () => {
    const world = await makeLockedWorld();
    const { treasurer } = await actorsOf(world);
    const [ana] = world.payers;
    await recordPayment(treasurer, {
      key: randomUUID(),
      memberId: ana.membership.id,
      buyId: null,
      method: 'transfer',
      amountMinor: world.dueOf(ana) + 1000,
      receivedOn: today,
      reference: '',
    });
    const tries = await Promise.allSettled(
      Array.from({ length: 6 }, () =>
        refundMember(treasurer, {
          key: randomUUID(),
          memberId: ana.membership.id,
          method: 'transfer',
          amountMinor: 400,
          paidOn: today,
          reference: '',
        }),
      ),
    );
    expect(tries.filter(({ status }) => status === 'fulfilled')).toHaveLength(2);
    const [row] = await select<{ n: number }>(
      "select count(*)::int as n from payments where direction = 'refund' and club_id = :id",
      { id: world.club.id },
    );
    expect(row?.n).toBe(2);
  });
});
