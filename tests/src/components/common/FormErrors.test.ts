import { render, screen } from '@testing-library/vue';
import { describe, expect, it } from 'vitest';
import FormErrors from 'src/components/common/FormErrors.vue';

const problem = (errors: Record<string, string>) => ({
  title: 'Some fields need another look',
  detail: 'Nothing was saved.',
  errors,
});

describe('FormErrors', () => {
  it('lists what no field shows itself, and takes the focus', async () => {
    const view = render(FormErrors, { props: { problem: null, shown: ['name'] } });
    expect(screen.queryByRole('alert')).toBeNull();
    await view.rerender({ problem: problem({ name: 'Write a name.', zone: 'Unknown zone.' }) });
    const box = await screen.findByRole('alert');
    expect(box.textContent).toContain('Unknown zone.');
    expect(box.textContent).not.toContain('Write a name.');
    expect(document.activeElement).toBe(box);
  });

  it('points to the fields when they say it all', () => {
    render(FormErrors, { props: { problem: problem({ name: 'Write a name.' }), shown: ['name'] } });
    expect(screen.getByRole('alert').textContent).toContain('See the marked fields.');
  });
});
