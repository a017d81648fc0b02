import { execute, transact } from '#server/config/database.ts';
import { Account } from '#server/models/Account.ts';
import { Membership } from '#server/models/Membership.ts';
import { hashPassword } from '#server/services/accounts/passwords.ts';
import {
  findAccountActor,
  findBuyActorAt,
  findClubActor,
  type BuyActor,
  type ClubActor,
} from '#server/services/actors.ts';
import { changeRoles } from '#server/services/clubs/changeRoles.ts';
import { foundClub } from '#server/services/clubs/foundClub.ts';
import { addGuest } from '#server/services/clubs/saveGuest.ts';
import { addOffer } from '#server/services/suppliers/changeOffer.ts';
import { addSupplier } from '#server/services/suppliers/changeSupplier.ts';
import type { FoundClubBody } from '#shared/schemas/clubs.ts';
import type { DemoSupplier } from './data/market.ts';
import type { DemoPersonData } from './data/people.ts';

/** Password of everybody in the demo, which answers on loopback alone. */
export const demoPassword = 'quillmere pond lilies';

const requestId = 'demo';

/** A demo club while it is being made: its people by key, and the salts of its own by key. */
export class DemoClub {
  readonly memberships = new Map<string, string>();
  readonly salts = new Map<string, string>();
  readonly suppliers = new Map<string, string>();
  private readonly accounts: Map<string, string>;

  private constructor(
    readonly slug: string,
    accounts: Map<string, string>,
  ) {
    this.accounts = accounts;
  }

  /** Founds the club by the first of its people, takes the others in and gives them their roles. */
  static async found(
    body: Omit<FoundClubBody, 'displayName'>,
    people: readonly DemoPersonData[],
    accounts: Map<string, string>,
  ): Promise<DemoClub> {
    const [founder] = people;
    if (!founder) throw new Error('a club needs a founder');
    const club = new DemoClub(body.slug, accounts);
    for (const { key, name } of people) await club.makeAccount(key, name);
    const actor = await findAccountActor(club.accountOf(founder.key), requestId);
    if (!actor) throw new Error('no founder');
    await foundClub(actor, { ...body, displayName: founder.name });
    await transact((tx) =>
      execute('update clubs set is_demo = true where slug = :slug', { slug: body.slug }, tx),
    );
    const steward = await club.actor(founder.key);
    club.memberships.set(founder.key, steward.membershipId);
    for (const person of people.slice(1)) await club.takeIn(steward, person);
    if (founder.roles) await club.giveRoles(steward, founder);
    return club;
  }

  private async makeAccount(key: string, displayName: string): Promise<void> {
    if (this.accounts.has(key)) return;
    const account = await Account.create({
      email: `${key}@quillmere.example`,
      displayName,
      passwordHash: await hashPassword(demoPassword),
    });
    this.accounts.set(key, account.id);
  }

  private async takeIn(steward: ClubActor, person: DemoPersonData): Promise<void> {
    const membership = await Membership.create({
      clubId: steward.club.id,
      accountId: this.accountOf(person.key),
      displayName: person.name,
    });
    this.memberships.set(person.key, membership.id);
    if (person.roles) await this.giveRoles(steward, person);
  }

  private async giveRoles(steward: ClubActor, { key, roles }: DemoPersonData): Promise<void> {
    const membership = await Membership.findByPk(this.memberOf(key), { rejectOnEmpty: true });
    await changeRoles(steward, membership.id, {
      version: membership.version,
      roles: { organiser: false, treasurer: false, steward: false, ...roles },
    });
  }

  async addGuest(
    by: string,
    guest: { key: string; name: string; contact: string; vouchedBy: string },
  ) {
    const id = await addGuest(await this.actor(by), {
      displayName: guest.name,
      contact: guest.contact,
      vouchedById: this.memberOf(guest.vouchedBy),
    });
    this.memberships.set(guest.key, id);
  }

  /** Suppliers and offers, entered by an organiser. */
  async stockMarket(by: string, market: readonly DemoSupplier[]): Promise<void> {
    const actor = await this.actor(by);
    for (const { key, supplier, offers } of market) {
      const made = await addSupplier(actor, supplier);
      this.suppliers.set(key, made.id);
      for (const offer of offers) {
        await addOffer(actor, made.id, {
          label: '',
          priceIncludesTax: true,
          taxRatePpm: 190_000,
          stockPacks: null,
          multipleOf: 1,
          link: '',
          ...offer,
          saltId: this.saltOf(offer.saltId),
        });
      }
    }
  }

  private accountOf(key: string): string {
    const id = this.accounts.get(key);
    if (!id) throw new Error(`no demo account ${key}`);
    return id;
  }

  memberOf(key: string): string {
    const id = this.memberships.get(key);
    if (!id) throw new Error(`no demo member ${key}`);
    return id;
  }

  hasAccount(key: string): boolean {
    return this.accounts.has(key);
  }

  /** A salt's id: the club's own by key, else of the shipped list. */
  saltOf(key: string): string {
    return this.salts.get(key) ?? key;
  }

  async actor(key: string): Promise<ClubActor> {
    const actor = await findClubActor(this.accountOf(key), this.slug, requestId);
    if (!actor) throw new Error(`${key} is not in ${this.slug}`);
    return actor;
  }

  async buyActor(key: string, buyId: string): Promise<BuyActor> {
    const actor = await findBuyActorAt(this.accountOf(key), this.slug, buyId, requestId);
    if (!actor) throw new Error(`${key} does not see the buy`);
    return actor;
  }
}
