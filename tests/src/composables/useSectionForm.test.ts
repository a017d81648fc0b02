import { flushPromises } from '@vue/test-utils';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { effectScope, reactive, ref, type EffectScope } from 'vue';
import { ApiProblem } from 'src/api/problem.ts';
import { useSectionForm, type SectionEffect } from 'src/composables/useSectionForm.ts';

type Fields = { place: string; note: string };

let scope: EffectScope;
let saved: { fields: Fields };
const auto = ref(true);
const send =
  vi.fn<
    (changed: Partial<Fields>, fields: Fields, preview: boolean) => Promise<SectionEffect | null>
  >();

function make() {
  const made = scope.run(() =>
    useSectionForm<Fields>({
      read: () => saved.fields,
      send: async (changed, fields, preview) => {
        const effect = await send(changed, fields, preview);
        if (!preview) saved.fields = { ...saved.fields, ...changed };
        return { effect: effect ?? null };
      },
      auto: () => auto.value,
    }),
  );
  if (!made) throw new Error('no scope');
  return made;
}

async function leave(section: ReturnType<typeof make>) {
  section.commit();
  await vi.advanceTimersByTimeAsync(0);
  await flushPromises();
}

beforeEach(() => {
  vi.useFakeTimers();
  scope = effectScope();
  saved = reactive({ fields: { place: 'Room 2', note: '' } });
  auto.value = true;
  send.mockReset();
});

afterEach(() => {
  scope.stop();
  vi.useRealTimers();
});

describe('useSectionForm', () => {
  it('saves what changed as one leaves its field, and nothing when nothing did', async () => {
    const section = make();
    await leave(section);
    expect(send).not.toHaveBeenCalled();
    section.form.place = 'Room 4';
    await leave(section);
    expect(send).toHaveBeenCalledExactlyOnceWith(
      { place: 'Room 4' },
      { place: 'Room 4', note: '' },
      false,
    );
    expect(section.saved.value).toBe(true);
    expect(section.dirty.value).toBe(false);
  });

  it('takes a saved change back', async () => {
    const section = make();
    section.form.place = 'Room 4';
    await leave(section);
    section.undo();
    await flushPromises();
    expect(send).toHaveBeenLastCalledWith({ place: 'Room 2' }, expect.anything(), false);
    expect(saved.fields.place).toBe('Room 2');
  });

  it('keeps what was typed when it is refused, beside what others changed meanwhile', async () => {
    const problem = { status: 409, code: 'stale', title: 'Changed meanwhile', detail: 'Changed' };
    send.mockRejectedValueOnce(new ApiProblem(problem));
    const section = make();
    section.form.place = 'Room 4';
    await leave(section);
    saved.fields = { place: 'Room 9', note: 'Bring a box' };
    await flushPromises();
    expect(section.form).toEqual({ place: 'Room 4', note: 'Bring a box' });
    expect(section.problem.value?.code).toBe('stale');
    await section.save();
    expect(saved.fields).toEqual({ place: 'Room 4', note: 'Bring a box' });
  });

  it('sends a change that was made while another was on its way', async () => {
    let answer: () => void = () => {};
    send.mockImplementationOnce(() => new Promise((resolve) => (answer = () => resolve(null))));
    const section = make();
    section.form.place = 'Room 4';
    await leave(section);
    section.form.note = 'Bring a box';
    await leave(section);
    expect(send).toHaveBeenCalledTimes(1);
    answer();
    await flushPromises();
    expect(send).toHaveBeenLastCalledWith({ note: 'Bring a box' }, expect.anything(), false);
  });

  it('waits for a yes where others are told, after showing what it does', async () => {
    auto.value = false;
    const effect = { summary: 'Place moved.', told: 3, beforeMinor: null, afterMinor: null };
    send.mockResolvedValueOnce(effect);
    const section = make();
    section.form.place = 'Room 4';
    await leave(section);
    expect(send).not.toHaveBeenCalled();
    await section.ask();
    expect(section.effect.value).toEqual(effect);
    expect(send).toHaveBeenLastCalledWith({ place: 'Room 4' }, expect.anything(), true);
    await section.save();
    expect(section.effect.value).toBeNull();
    expect(saved.fields.place).toBe('Room 4');
  });

  it('drops what is not saved', () => {
    const section = make();
    section.form.place = 'Room 4';
    section.reset();
    expect(section.form.place).toBe('Room 2');
    expect(section.dirty.value).toBe(false);
  });
});
