import { Dialog } from 'quasar';

export type ConfirmChoices = {
  title: string;
  /** What will be gone or changed, by name. */
  text: string;
  /** The act itself, such as 'Remove Noor Valdane'. */
  act: string;
  danger?: boolean;
};

const frame = ({ title, text, act, danger = false }: ConfirmChoices) => ({
  title,
  message: text,
  'aria-label': title,
  class: 'tw-ask',
  ok: { label: act, unelevated: true, color: danger ? 'negative' : 'primary' },
  cancel: { label: 'Cancel', flat: true, color: 'ink' },
});

/** Asks before an act that can't be undone; the safe answer has the focus. */
export const confirmAct = (choices: ConfirmChoices) =>
  new Promise<boolean>((resolve) => {
    Dialog.create({ ...frame(choices), focus: choices.danger ? 'cancel' : 'ok' })
      .onOk(() => resolve(true))
      .onCancel(() => resolve(false));
  });

/** Asks for a sentence, such as a reason; `null` when the person thinks better of it. */
export const askText = (choices: ConfirmChoices & { label: string; value?: string }) =>
  new Promise<string | null>((resolve) => {
    Dialog.create({
      ...frame(choices),
      prompt: {
        model: choices.value ?? '',
        label: choices.label,
        outlined: true,
        color: 'primary',
        type: 'textarea',
        isValid: (text: string) => text.trim().length > 0,
      },
    })
      .onOk((text: string) => resolve(text.trim()))
      .onCancel(() => resolve(null));
  });
