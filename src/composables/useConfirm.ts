import { markRaw, shallowReactive, type Component } from 'vue';

export type ConfirmChoices = {
  title: string;
  /** What will be gone or changed, by name. */
  text: string;
  /** The act itself, such as 'Remove Noor Valdane'. */
  act: string;
  danger?: boolean;
};

export type Prompt = { label: string; value?: string };

/** One question on screen; `answer` counts once, and null is the safe answer. */
export type Question = {
  id: number;
  /** The dialog that asks it; null: the usual one. */
  dialog: Component | null;
  props: Record<string, unknown>;
  answer: (text: string | null) => void;
};

let last = 0;

/** What is being asked right now; the app shows a dialog for each. */
export const questions = shallowReactive<Question[]>([]);

/** Takes a question off the screen; unanswered, it was thought better of. */
export function closeQuestion(question: Question) {
  question.answer(null);
  const place = questions.findIndex(({ id }) => id === question.id);
  if (place >= 0) questions.splice(place, 1);
}

const ask = (dialog: Component | null, props: Record<string, unknown>) =>
  new Promise<string | null>((answer) => {
    last += 1;
    questions.push({ dialog, props, answer, id: last });
  });

/** Asks before an act that can't be undone; the safe answer has the focus. */
export const confirmAct = async (choices: ConfirmChoices): Promise<boolean> =>
  (await ask(null, { choices })) !== null;

/** Asks for a sentence, such as a reason; `null` when the person thinks better of it. */
export const askText = ({
  label,
  value,
  ...choices
}: ConfirmChoices & { label: string; value?: string }): Promise<string | null> =>
  ask(null, { choices, prompt: { label, value } });

/** Asks with a dialog of its own, which gets the question beside its props; true once it was answered. */
export const confirmWith = async (
  dialog: Component,
  props: Record<string, unknown>,
): Promise<boolean> => (await ask(markRaw(dialog), props)) !== null;
