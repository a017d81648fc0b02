import { mount } from '@vue/test-utils';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { defineComponent, ref, type Ref } from 'vue';
import { ApiProblem } from 'src/api/problem.ts';
import { useApiForm } from 'src/composables/useApiForm.ts';
import { formatRemaining, useCountdown } from 'src/composables/useCountdown.ts';
import { useLoad } from 'src/composables/useLoad.ts';

const refusal = new ApiProblem({
  status: 422,
  code: 'invalid',
  title: 'Some fields need another look',
  errors: { name: 'Write a name.' },
});

describe('useApiForm', () => {
  it('keeps a refusal with its fields and forgets it at the next try', async () => {
    const submit = vi.fn().mockRejectedValueOnce(refusal).mockResolvedValueOnce('saved');
    const onDone = vi.fn();
    const form = useApiForm(submit, { onDone });
    expect(await form.run()).toBe(false);
    expect(form.errors.value.name).toBe('Write a name.');
    expect(onDone).not.toHaveBeenCalled();
    expect(await form.run()).toBe(true);
    expect(form.problem.value).toBeNull();
    expect(onDone).toHaveBeenCalledExactlyOnceWith('saved');
  });

  it('sends once for a double press', async () => {
    let finish = () => {};
    const submit = vi.fn(() => new Promise<void>((resolve) => (finish = resolve)));
    const form = useApiForm(submit);
    const first = form.run();
    expect(form.pending.value).toBe(true);
    expect(await form.run()).toBe(false);
    finish();
    await first;
    expect(submit).toHaveBeenCalledOnce();
    expect(form.pending.value).toBe(false);
  });
});

describe('useLoad', () => {
  it('lets only the newest load speak', async () => {
    const answers: ((error?: Error) => void)[] = [];
    const load = () =>
      new Promise<void>((resolve, reject) => {
        answers.push((error) => (error ? reject(error) : resolve()));
      });
    const { loading, problem, reload } = useLoad(load);
    const second = reload();
    answers[0]?.(new Error('late and wrong'));
    answers[1]?.();
    await second;
    expect(loading.value).toBe(false);
    expect(problem.value).toBeNull();
  });
});

describe('useCountdown', () => {
  beforeEach(() => vi.useFakeTimers({ now: Date.parse('2026-12-12T12:00:00Z') }));
  afterEach(() => vi.useRealTimers());

  it.each([
    [3 * 86_400_000 + 4 * 3_600_000 + 59 * 60_000, '3 d 4 h'],
    [3_600_000, '1 h 0 min'],
    [59 * 60_000 + 59_999, '59 min'],
    [48_900, '48 s'],
    [-5, '0 s'],
  ])('writes %d ms as %s', (ms, text) => {
    expect(formatRemaining(ms)).toBe(text);
  });

  it('ticks to the end and stops with its page', async () => {
    const until: Ref<string | null> = ref('2026-12-12T12:00:02Z');
    let countdown: ReturnType<typeof useCountdown> | undefined;
    const page = mount(
      defineComponent(() => {
        countdown = useCountdown(until);
        return () => null;
      }),
    );
    expect(countdown?.text.value).toBe('2 s');
    expect(countdown?.over.value).toBe(false);
    await vi.advanceTimersByTimeAsync(3_000);
    expect(countdown?.over.value).toBe(true);
    page.unmount();
    expect(vi.getTimerCount()).toBe(0);
  });
});
