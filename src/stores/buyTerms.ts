import type {
  BuyTerms,
  ChargeBody,
  HeadBody,
  LineBody,
  LineChange,
  LineChoice,
  TermsReply,
} from '#shared/schemas/buyTerms.ts';
import { defineStore } from 'pinia';
import { ref } from 'vue';
import {
  deleteCharge,
  deleteLine,
  getLineChoices,
  getTerms,
  patchTerms,
  postCharge,
  postChargeRestore,
  postLine,
  postLineRestore,
  putCharge,
  putLine,
  putLineOrder,
} from 'src/api/buyTerms.ts';
import { asProblem } from 'src/api/problem.ts';
import { useBuysStore } from 'src/stores/buys.ts';

export type HeadFields = Omit<HeadBody, 'termsVersion' | 'preview'>;
export type LineFields = Omit<LineChange, 'termsVersion' | 'preview'>;
export type NewLine = Omit<LineBody, 'termsVersion' | 'preview'>;
export type ChargeFields = Omit<ChargeBody, 'termsVersion' | 'preview'>;

/** What the server saw of the terms when it is asked: the version, and whether it shall only say what it would do. */
type Seen = { termsVersion: number; preview?: boolean };

/** One wish about a buy's terms, to be sent against the newest version this page knows. */
export type TermsAct = (club: string, buy: string, seen: Seen) => Promise<TermsReply>;

export const termsActs = {
  head:
    (fields: HeadFields): TermsAct =>
    (club, buy, seen) =>
      patchTerms(club, buy, { ...fields, ...seen }),
  addLine:
    (line: NewLine): TermsAct =>
    (club, buy, seen) =>
      postLine(club, buy, { ...line, ...seen }),
  line:
    (id: string, fields: LineFields): TermsAct =>
    (club, buy, seen) =>
      putLine(club, buy, id, { ...fields, ...seen }),
  order:
    (lineIds: string[]): TermsAct =>
    (club, buy, { termsVersion }) =>
      putLineOrder(club, buy, { lineIds, termsVersion }),
  removeLine:
    (id: string): TermsAct =>
    (club, buy, seen) =>
      deleteLine(club, buy, id, seen),
  restoreLine:
    (id: string): TermsAct =>
    (club, buy, seen) =>
      postLineRestore(club, buy, id, seen),
  addCharge:
    (charge: ChargeFields): TermsAct =>
    (club, buy, seen) =>
      postCharge(club, buy, { ...charge, ...seen }),
  charge:
    (id: string, fields: ChargeFields): TermsAct =>
    (club, buy, seen) =>
      putCharge(club, buy, id, { ...fields, ...seen }),
  removeCharge:
    (id: string): TermsAct =>
    (club, buy, seen) =>
      deleteCharge(club, buy, id, seen),
  restoreCharge:
    (id: string): TermsAct =>
    (club, buy, seen) =>
      postChargeRestore(club, buy, id, seen),
};

/** The terms of buys that are being edited. Changes of one buy are sent one after the other. */
export const useBuyTermsStore = defineStore('buyTerms', () => {
  const buys = useBuysStore();
  const terms = ref<Record<string, BuyTerms>>({});
  const choices = ref<Record<string, LineChoice[]>>({});
  const queues = new Map<string, Promise<unknown>>();

  const termsOf = (buy: string): BuyTerms | null => terms.value[buy] ?? null;
  const choicesOf = (buy: string): LineChoice[] => choices.value[buy] ?? [];

  function receive(reply: TermsReply) {
    const shown = terms.value[reply.head.id];
    if (!shown || shown.termsVersion <= reply.terms.termsVersion)
      terms.value[reply.head.id] = reply.terms;
    buys.receive(reply.head);
  }

  async function load(club: string, buy: string) {
    terms.value[buy] = await getTerms(club, buy);
  }

  async function loadChoices(club: string, buy: string) {
    choices.value[buy] = (await getLineChoices(club, buy)).salts;
  }

  /**
   * Sends one change after those before it have been answered. A stale version loads what is there now, so that the
   * same change can be sent again, and is thrown on for the page to say what changed.
   */
  function send(
    club: string,
    buy: string,
    act: TermsAct,
    options: { preview?: boolean } = {},
  ): Promise<TermsReply> {
    const before = queues.get(buy) ?? Promise.resolve();
    const sent = before.then(async () => {
      const seen = {
        termsVersion: termsOf(buy)?.termsVersion ?? buys.headOf(buy)?.termsVersion ?? 0,
        ...(options.preview ? { preview: true } : {}),
      };
      try {
        const reply = await act(club, buy, seen);
        receive(reply);
        return reply;
      } catch (error) {
        if (asProblem(error).code === 'stale' || asProblem(error).code === 'wrong_state')
          await Promise.all([load(club, buy), buys.load(club, buy)]);
        throw error;
      }
    });
    queues.set(
      buy,
      sent.catch(() => undefined),
    );
    return sent;
  }

  return { termsOf, choicesOf, receive, load, loadChoices, send };
});
