import { fireEvent, render, screen, waitFor } from '@testing-library/vue';
import { afterEach, beforeAll, describe, expect, it } from 'vitest';
import App from 'src/App.vue';
import { defineComponent, h, type PropType } from 'vue';
import {
  askText,
  closeQuestion,
  confirmAct,
  confirmWith,
  questions,
  type Question,
} from 'src/composables/useConfirm.ts';

const choices = {
  title: 'Remove Noor Valdane?',
  text: 'Noor loses what she pledged.',
  act: 'Remove Noor',
};
const show = () => render(App, { global: { stubs: { RouterView: true } } });
const button = (name: string) => screen.findByRole('button', { name });

beforeAll(() => import('src/components/common/AskDialog.vue'));
afterEach(() => [...questions].forEach(closeQuestion));

describe('confirmAct', () => {
  it('says yes only for the act itself, and takes the dialog away', async () => {
    show();
    const agreed = confirmAct(choices);
    await screen.findByRole('dialog', { name: choices.title });
    await fireEvent.click(await button('Remove Noor'));
    expect(await agreed).toBe(true);
    await waitFor(() => expect(questions).toHaveLength(0));
  });

  it('starts at the safe answer when something would be lost, and Cancel means no', async () => {
    show();
    const agreed = confirmAct({ ...choices, danger: true });
    const cancel = await button('Cancel');
    await waitFor(() => expect(document.activeElement).toBe(cancel));
    await fireEvent.click(cancel);
    expect(await agreed).toBe(false);
  });

  it('takes Esc for no', async () => {
    show();
    const agreed = confirmAct(choices);
    const act = await button('Remove Noor');
    await waitFor(() => expect(document.activeElement).toBe(act));
    await fireEvent.keyDown(act, { key: 'Escape', keyCode: 27 });
    await fireEvent.keyUp(act, { key: 'Escape', keyCode: 27 });
    expect(await agreed).toBe(false);
  });
});

describe('askText', () => {
  it('takes no empty text and gives it without the space around', async () => {
    show();
    const answer = askText({ ...choices, label: 'Why' });
    const field = await screen.findByLabelText('Why');
    await fireEvent.update(field, '   ');
    expect((await button('Remove Noor')).hasAttribute('disabled')).toBe(true);
    await fireEvent.update(field, ' Left the club ');
    await fireEvent.click(await button('Remove Noor'));
    expect(await answer).toBe('Left the club');
  });

  it('starts with what was written before and gives null for Cancel', async () => {
    show();
    const answer = askText({ ...choices, label: 'Why', value: 'Moved away' });
    const field = await screen.findByLabelText<HTMLTextAreaElement>('Why');
    expect(field.value).toBe('Moved away');
    await fireEvent.click(await button('Cancel'));
    expect(await answer).toBeNull();
  });
});

describe('confirmWith', () => {
  const Cautions = defineComponent({
    props: {
      question: { type: Object as PropType<Question>, required: true },
      salt: { type: String, required: true },
    },
    setup: (props) => () =>
      h('button', { onClick: () => props.question.answer('read') }, `Read about ${props.salt}`),
  });

  it('shows the dialog it is given, and holds until that has answered', async () => {
    show();
    const agreed = confirmWith(Cautions, { salt: 'Potassium nitrate' });
    await fireEvent.click(await button('Read about Potassium nitrate'));
    expect(await agreed).toBe(true);
  });
});
