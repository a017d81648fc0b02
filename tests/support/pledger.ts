import type { MySheet, PledgeReply, SheetReply } from '#shared/schemas/sheet.ts';
import { signInByHttp, type HttpClient } from './httpClient.ts';

/** Somebody who changes their pledge of one salt again and again over HTTP. */
export class Pledger {
  /** What the server said it kept, in order. */
  readonly kept: PledgeReply['pledge'][] = [];
  /** What was sent last, maybe unanswered. */
  sentMg = 0;

  private constructor(
    readonly client: HttpClient,
    readonly buyPath: string,
    readonly lineId: string,
    readonly membershipId: string,
    private version: number,
  ) {}

  static async of(url: string, email: string, buyPath: string, salt: string): Promise<Pledger> {
    const client = await signInByHttp(url, email);
    const sheet = await client.json<SheetReply>(`${buyPath}/sheet`);
    const mine = await client.json<MySheet>(`${buyPath}/sheet/mine`);
    const lineId = sheet.terms.lines.find((line) => line.salt.name === salt)?.id ?? '';
    const version = mine.pledges.find((pledge) => pledge.lineId === lineId)?.version ?? 0;
    return new Pledger(client, buyPath, lineId, mine.membershipId, version);
  }

  /** Pledges once; gives the status. */
  async pledge(wantedMg: number): Promise<number> {
    this.sentMg = wantedMg;
    const reply = await this.client.call(
      'PUT',
      `${this.buyPath}/lines/${this.lineId}/pledges/${this.membershipId}`,
      { wantedMg, upToMg: null, version: this.version },
    );
    if (reply.ok) {
      const { pledge } = (await reply.json()) as PledgeReply;
      this.version = pledge.version;
      this.kept.push(pledge);
    }
    return reply.status;
  }

  /** Pledges on until the connection breaks. */
  async pledgeUntilCut(from: number): Promise<void> {
    for (let grams = from; ; grams += 1) {
      try {
        await this.pledge(grams * 1000);
      } catch {
        return;
      }
    }
  }
}
