import { randomUUID } from 'node:crypto';
import { execute, select, transact } from '#server/config/database.ts';
import { Buy } from '#server/models/Buy.ts';
import type { BuyActor } from '#server/services/actors.ts';
import { addCharge } from '#server/services/buys/changeCharges.ts';
import { changeHead } from '#server/services/buys/changeHead.ts';
import { addLine } from '#server/services/buys/changeLines.ts';
import { createBuy } from '#server/services/buys/createBuy.ts';
import { openBuy } from '#server/services/buys/openBuy.ts';
import { clubToday } from '#server/services/ledger/clubDay.ts';
import { owedOfBuy } from '#server/services/ledger/owed.ts';
import { recordPayment } from '#server/services/ledger/recordPayment.ts';
import { confirmBill } from '#server/services/orders/confirmBill.ts';
import { enterBill } from '#server/services/orders/enterBill.ts';
import { loadOrderBook } from '#server/services/orders/orderBook.ts';
import { placeOrder } from '#server/services/orders/placeOrder.ts';
import { saltsByIds } from '#server/services/salts/saltsOfClub.ts';
import { changePledge } from '#server/services/sheet/changePledge.ts';
import { confirmHazard, confirmOnPaper } from '#server/services/sheet/confirmHazard.ts';
import { lockBuy } from '#server/services/sheet/lockBuy.ts';
import { applyTargets } from '#server/services/splits/applyTargets.ts';
import { closeBag } from '#server/services/splits/closeBag.ts';
import { countBag } from '#server/services/splits/countBag.ts';
import { finishSplitting } from '#server/services/splits/finishSplitting.ts';
import { keepWeighing } from '#server/services/splits/keepWeighing.ts';
import { markArrived } from '#server/services/splits/markArrived.ts';
import { previewFinal } from '#server/services/splits/previewFinal.ts';
import { previewTargets } from '#server/services/splits/previewTargets.ts';
import { readSplit } from '#server/services/splits/readSplit.ts';
import { recordArrival } from '#server/services/splits/recordArrival.ts';
import { startSplitting } from '#server/services/splits/startSplitting.ts';
import type { HeadBody } from '#shared/schemas/buyTerms.ts';
import type { DemoLine } from './data/buys.ts';
import type { DemoClub } from './demoClub.ts';

const gram = 1000;

/** Tax at 19 % that an amount contains, in minor units. */
const taxIn = (minor: number) => Math.round((minor * 19) / 119);

/** A demo buy, moved on by the services that people use, step by step. */
export class DemoBuy {
  private constructor(
    readonly club: DemoClub,
    readonly id: string,
    private readonly organiser: string,
    private readonly treasurer: string,
  ) {}

  /** Drafts a buy with its lines and a charge for bags and labels. */
  static async draft(
    club: DemoClub,
    by: { organiser: string; treasurer: string },
    head: Omit<HeadBody, 'termsVersion' | 'preview'> & { name: string },
    lines: readonly DemoLine[],
  ): Promise<DemoBuy> {
    const { id } = await createBuy(await club.actor(by.organiser), head.name);
    const buy = new DemoBuy(club, id, by.organiser, by.treasurer);
    await changeHead(await buy.own(), { ...head, termsVersion: await buy.termsVersion() });
    for (const { saltId, stepMg, note } of lines) {
      await addLine(await buy.own(), {
        saltId: club.saltOf(saltId),
        ...(stepMg ? { stepMg } : {}),
        ...(note ? { note } : {}),
        termsVersion: await buy.termsVersion(),
      });
    }
    await addCharge(await buy.own(), {
      kind: 'bags',
      name: 'Bags and labels',
      amountMinor: 1140,
      basis: 'portion',
      supplierId: null,
      lineIds: null,
      taxRatePpm: 190_000,
      termsVersion: await buy.termsVersion(),
    });
    return buy;
  }

  own(): Promise<BuyActor> {
    return this.club.buyActor(this.organiser, this.id);
  }

  private async termsVersion(): Promise<number> {
    return (await Buy.findByPk(this.id, { rejectOnEmpty: true })).termsVersion;
  }

  async open(): Promise<void> {
    await openBuy(await this.own(), await this.termsVersion());
  }

  /** Everybody's pledges, each by their own hand; the organiser enters those of guests. */
  async pledge(lines: readonly DemoLine[]): Promise<void> {
    const rows = await select<{ id: string; salt_id: string }>(
      'select id, salt_id from lines where buy_id = :buyId',
      { buyId: this.id },
    );
    const own = await this.own();
    const salts = await saltsByIds(
      own.club.id,
      rows.map(({ salt_id }) => salt_id),
    );
    for (const { saltId, pledges } of lines) {
      const line = rows.find(({ salt_id }) => salt_id === this.club.saltOf(saltId));
      if (!line) throw new Error(`no line of ${saltId}`);
      for (const [key, grams] of Object.entries(pledges)) {
        const member = this.club.hasAccount(key);
        const actor = member ? await this.club.buyActor(key, this.id) : own;
        const membershipId = this.club.memberOf(key);
        if (salts.get(line.salt_id)?.classified) {
          if (member) await confirmHazard(actor, line.salt_id);
          else await confirmOnPaper(own, membershipId, { saltId: line.salt_id, signed: true });
        }
        const [wanted, upTo] = typeof grams === 'number' ? [grams, null] : grams;
        await changePledge(
          actor,
          { lineId: line.id, membershipId },
          { wantedMg: wanted * gram, upToMg: upTo === null ? null : upTo * gram, version: 0 },
        );
      }
    }
  }

  async lock(): Promise<void> {
    await lockBuy(await this.own(), await this.termsVersion());
  }

  /** Records what everyone owes as paid by transfer, but for those named. */
  async collect(except: readonly string[] = []): Promise<void> {
    const actor = await this.club.actor(this.treasurer);
    const receivedOn = await clubToday(actor.club.id);
    const spared = new Set(except.map((key) => this.club.memberOf(key)));
    for (const [memberId, { openMinor }] of await owedOfBuy(this.id)) {
      if (openMinor <= 0 || spared.has(memberId)) continue;
      await recordPayment(actor, {
        key: randomUUID(),
        memberId,
        buyId: this.id,
        method: 'transfer',
        amountMinor: openMinor,
        receivedOn,
        reference: '',
      });
    }
  }

  /** Places an order with each supplier, enters their bills as ordered and has them confirmed and paid. */
  async order(): Promise<void> {
    const own = await this.own();
    const today = await clubToday(own.club.id);
    for (const { supplierId } of (await loadOrderBook(this.id)).orders) {
      const order = (await loadOrderBook(this.id)).orders.find(
        (each) => each.supplierId === supplierId,
      );
      await placeOrder(await this.own(), supplierId, {
        version: order?.version ?? 0,
        termsVersion: await this.termsVersion(),
        placedOn: today,
        reference: '',
        note: '',
      });
    }
    for (const order of (await loadOrderBook(this.id)).orders) {
      const goodsMinor = order.packs.reduce(
        (sum, { packs, priceMinor }) => sum + packs * priceMinor,
        0,
      );
      const { id } = await enterBill(await this.own(), {
        version: 0,
        supplierId: order.supplierId,
        payee: '',
        number: `R-${order.supplierId.slice(0, 4)}`,
        billedOn: today,
        goods: order.packs.map(({ offerId, packs, priceMinor }) => ({
          offerId,
          packs,
          amountMinor: packs * priceMinor,
          taxRatePpm: 190_000,
        })),
        charges:
          order.shippingMinor === 0
            ? []
            : [
                {
                  kind: 'freight',
                  name: 'Freight',
                  amountMinor: order.shippingMinor,
                  taxRatePpm: 190_000,
                  basis: 'mass',
                  chargeId: null,
                },
              ],
        taxMinor: taxIn(goodsMinor + order.shippingMinor),
        paidBy: 'club',
        advancedById: null,
      });
      await this.confirm(id);
    }
  }

  /** The bags and labels, bought at the counter by the organiser out of their own pocket. */
  async billBags(): Promise<void> {
    const own = await this.own();
    const [charge] = await select<{ id: string }>(
      `select id from charges where buy_id = :buyId and kind = 'bags' and removed_at is null`,
      { buyId: this.id },
    );
    const { id } = await enterBill(own, {
      version: 0,
      supplierId: null,
      payee: 'Packaging counter',
      number: '',
      billedOn: await clubToday(own.club.id),
      goods: [],
      charges: [
        {
          kind: 'bags',
          name: 'Bags and labels',
          amountMinor: 1140,
          taxRatePpm: 190_000,
          basis: 'portion',
          chargeId: charge?.id ?? null,
        },
      ],
      taxMinor: taxIn(1140),
      paidBy: 'member',
      advancedById: own.membershipId,
    });
    await this.confirm(id);
  }

  private async confirm(billId: string): Promise<void> {
    const treasurer = await this.club.buyActor(this.treasurer, this.id);
    await confirmBill(treasurer, billId, { version: 1, paidFrom: 'bank' });
  }

  /** Everything comes, a little over its nominal mass; bags are weighed and the targets made. */
  async arrive(): Promise<void> {
    for (const order of (await readSplit(await this.own())).orders) {
      await recordArrival(await this.own(), order.supplierId, {
        version: order.version,
        packs: order.packs.map(({ offerId, ordered }) => ({ offerId, packs: ordered })),
        note: '',
      });
    }
    for (const bag of (await readSplit(await this.own())).bags) {
      const tareMg = Math.round(bag.nominalMg / 250 / gram) * gram + 2 * gram;
      await countBag(await this.own(), bag.id, {
        version: bag.version,
        grossMg: bag.nominalMg + tareMg + 2 * gram,
        tareMg,
        lot: `${bag.supplier.slice(0, 2).toUpperCase()}-26${String(bag.number).padStart(2, '0')}`,
        missing: false,
        damage: '',
        note: '',
      });
    }
    await markArrived(await this.own(), await this.termsVersion());
    const { basis } = await previewTargets(await this.own());
    await applyTargets(await this.own(), { termsVersion: await this.termsVersion(), basis });
  }

  async startSplit(): Promise<void> {
    await startSplitting(await this.own(), await this.termsVersion());
  }

  /** Weighs portions a hair off their targets: all, or every other one. */
  async weigh(which: 'all' | 'half'): Promise<void> {
    const split = await readSplit(await this.own());
    const left = new Map(split.bags.map(({ id, netMg }) => [id, netMg ?? 0]));
    for (const [index, portion] of split.portions.entries()) {
      if (which === 'half' && index % 2 === 1) continue;
      const readingMg = portion.targetMg + ((index % 5) - 2) * 100;
      const bag = split.bags.find(
        ({ id, lineId }) => lineId === portion.lineId && (left.get(id) ?? 0) >= readingMg,
      );
      if (!bag) continue;
      left.set(bag.id, (left.get(bag.id) ?? 0) - readingMg);
      await keepWeighing(await this.own(), {
        id: randomUUID(),
        portionId: portion.id,
        bagId: bag.id,
        station: 'Table by the window',
        scale: 'Scale 1',
        divisionMg: 100,
        capacityMg: null,
        readingMg,
        secondLook: true,
        targetMg: portion.targetMg,
        targetVersion: portion.targetVersion,
      });
    }
  }

  /** Closes the bags on what is left and posts the final shares. */
  async finish(): Promise<void> {
    for (const bag of (await readSplit(await this.own())).bags) {
      await closeBag(await this.own(), bag.id, {
        version: bag.version,
        shelfMg: Math.max(0, (bag.netMg ?? 0) - bag.portionsMg - gram),
        tareMg: null,
        unaccountedNote: '',
      });
    }
    const { basis } = await previewFinal(await this.own());
    await finishSplitting(await this.own(), { termsVersion: await this.termsVersion(), basis });
  }

  /** Puts the buy so many days into the past. What is in the books keeps its day: nothing there is ever changed. */
  async backdate(days: number): Promise<void> {
    const past = (column: string) => `${column} = ${column} - make_interval(days => :days)`;
    const times = ['opened', 'locked', 'ordered', 'arrived', 'splitting', 'pickup', 'settled']
      .map((step) => `${step}_at`)
      .concat('closes_at', 'splits_at', 'split_ends_at', 'due_at', 'created_at');
    await transact(async (tx) => {
      const values = { days, buyId: this.id };
      await execute(`update buys set ${times.map(past).join(', ')} where id = :buyId`, values, tx);
      await execute(`update terms_changes set ${past('at')} where buy_id = :buyId`, values, tx);
      await execute(`update notices set ${past('created_at')} where buy_id = :buyId`, values, tx);
    });
  }
}
