import type { BuyHeader } from '#shared/schemas/buys.ts';
import type { TermsReply } from '#shared/schemas/buyTerms.ts';
import { ref, shallowRef } from 'vue';
import { notifyProblem } from 'src/composables/useNotify.ts';
import type { SectionEffect } from 'src/composables/useSectionForm.ts';
import { useBuyTermsStore, type TermsAct } from 'src/stores/buyTerms.ts';

/**
 * A change of terms that is one press: in a draft it is sent at once; in an open buy its effect is shown first and
 * `confirm` sends it. `act` gives the reply, or null when it was not confirmed.
 */
export function useTermsAct(club: () => string, head: () => BuyHeader) {
  const store = useBuyTermsStore();
  const effect = shallowRef<SectionEffect | null>(null);
  const pending = ref(false);
  let waiting: {
    act: TermsAct;
    answer: (reply: TermsReply | null) => void;
    fail: (error: unknown) => void;
  } | null = null;

  const send = (act: TermsAct, preview = false) =>
    store.send(club(), head().id, act, preview ? { preview } : {});

  /** `quiet`: it changes nothing that anybody is told of, so it is not asked about. */
  async function act(
    wish: TermsAct,
    options: { quiet?: boolean } = {},
  ): Promise<TermsReply | null> {
    if (head().state === 'draft' || options.quiet) return send(wish);
    const asked = await send(wish, true);
    if (!asked.effect) return asked;
    effect.value = asked.effect;
    return new Promise((answer, fail) => {
      waiting = { act: wish, answer, fail };
    });
  }

  async function confirm() {
    const asked = waiting;
    if (!asked || pending.value) return;
    pending.value = true;
    try {
      const reply = await send(asked.act);
      waiting = null;
      effect.value = null;
      asked.answer(reply);
    } catch (error) {
      waiting = null;
      effect.value = null;
      asked.fail(error);
    } finally {
      pending.value = false;
    }
  }

  function drop() {
    effect.value = null;
    waiting?.answer(null);
    waiting = null;
  }

  /** The same for a press that has no form to say a refusal in. */
  const actOrNotify = (wish: TermsAct) =>
    act(wish).catch((error: unknown) => {
      notifyProblem(error);
      return null;
    });

  return { act, actOrNotify, effect, pending, confirm, drop };
}
