import { paymentReference } from '#shared/domain/ledger/reference.ts';
import type { LockedMember, LockedReply, Slip } from '#shared/schemas/orders.ts';
import { select } from '../../config/database.ts';
import { Buy } from '../../models/Buy.ts';
import { canNoteCash, canKeepBooks } from '../../policies/ledger.ts';
import { canOrder, canRemind, canSeeMoneyOfBuy, canVouch } from '../../policies/orders.ts';
import { presentPacks } from '../../presenters/orders/presentOrder.ts';
import { presentSlip } from '../../presenters/orders/presentSlip.ts';
import type { BuyActor } from '../actors.ts';
import { owedOfBuy } from '../ledger/owed.ts';
import { notFound } from '../problem.ts';
import { ordersPlaced } from './findOrders.ts';
import { loadOrderBook, type OrderBook } from './orderBook.ts';

const byMinor = <T>(rows: readonly T[], of: (row: T) => number) =>
  rows.reduce((sum, row) => sum + of(row), 0);

async function presentMembers(
  actor: BuyActor,
  book: OrderBook,
  seeMoney: boolean,
): Promise<LockedMember[]> {
  const owed = await owedOfBuy(actor.buy.id);
  const shares = new Map(book.sheet.members.map((share) => [share.memberId, share.totalMinor]));
  return [...book.members.values()].map((member): LockedMember => {
    const standing = owed.get(member.id);
    const own = member.id === actor.membershipId;
    return {
      id: member.id,
      name: member.name,
      guest: member.guest,
      shareMinor: shares.get(member.id) ?? 0,
      lockedMinor: member.lockedMinor,
      dropped: member.dropped,
      money:
        seeMoney || own
          ? {
              dueMinor: member.dueMinor,
              paidMinor: standing?.paidMinor ?? 0,
              openMinor: standing?.openMinor ?? 0,
              vouchedBy: member.vouchedBy,
              vouchedReason: member.vouchedReason,
              remindedAt: member.remindedAt?.toISOString() ?? null,
            }
          : null,
      mustAgree: (seeMoney || own) && member.overLimitMinor !== null && !member.agreed,
      agreedMinor: seeMoney || own ? member.overLimitMinor : null,
    };
  });
}

/** The locked buy: frozen shares, what is due, and who has paid for those who may know. */
export async function readLocked(actor: BuyActor): Promise<LockedReply> {
  const buy = await Buy.findByPk(actor.buy.id, { rejectOnEmpty: true });
  const book = await loadOrderBook(buy.id);
  const placed = await ordersPlaced(buy.id);
  const seeMoney = canSeeMoneyOfBuy(actor);
  const members = await presentMembers(actor, book, seeMoney);
  const [club] = await select<{ transfer_how: string }>(
    'select transfer_how from clubs where id = :id',
    { id: buy.clubId },
  );
  const locked = buy.state === 'locked';
  const names = new Map(book.terms.suppliers.map(({ id, name }) => [id, name]));
  const living = members.filter(({ dropped }) => !dropped);
  const paying = ['locked', 'ordered', 'arrived', 'splitting', 'pickup'].includes(buy.state);
  return {
    state: buy.state,
    termsVersion: buy.termsVersion,
    dueAt: buy.dueAt?.toISOString() ?? null,
    lockedAt: buy.lockedAt?.toISOString() ?? null,
    priceLimitPermille: buy.priceLimitPermille,
    ordersPlaced: placed,
    members,
    slip: presentSlip(book.terms, book.sheet, { id: actor.membershipId, name: actor.name }),
    plan: book.orders.flatMap((order) =>
      presentPacks(book.terms, order.packs).map((pack) => ({
        ...pack,
        supplierName: names.get(order.supplierId) ?? '',
        leftOverMg: book.plan.leftOverMg[pack.lineId] ?? 0,
      })),
    ),
    totals: {
      shareMinor: byMinor(living, ({ shareMinor }) => shareMinor),
      shelfMinor: book.sheet.shelf.totalMinor,
      paidMinor: seeMoney ? byMinor(members, ({ money }) => money?.paidMinor ?? 0) : null,
      openMinor: seeMoney ? byMinor(members, ({ money }) => money?.openMinor ?? 0) : null,
    },
    pay: {
      transferHow: club?.transfer_how ?? '',
      reference: paymentReference(buy.id, actor.membershipId),
    },
    may: {
      seeMoney,
      vouch: canVouch(actor) && paying,
      drop: canOrder(actor) && locked && !placed,
      remind: canRemind(actor) && paying,
      noteCash: canNoteCash(actor) && paying,
      reopen: canOrder(actor) && locked && !placed,
      recordPayment: canKeepBooks(actor),
    },
  };
}

/**
 * Anyone's slip, for the organisers of the buy and treasurers.
 * @throws DomainProblem 404
 */
export async function readSlip(actor: BuyActor, memberId: string): Promise<Slip> {
  const book = await loadOrderBook(actor.buy.id);
  const name = book.members.get(memberId)?.name ?? '';
  const slip = presentSlip(book.terms, book.sheet, { id: memberId, name });
  if (!slip) throw notFound('This share');
  return slip;
}
