import { render, screen } from '@testing-library/vue';
import { defineComponent, h, ref, type Component } from 'vue';

/** Mounts a number field under a model, as a form does, and tells what it gave. */
export function mountField(field: Component, props: { label: string } & Record<string, unknown>) {
  const { start = null, ...rest } = props;
  const model = ref(start as number | null);
  const seen: (number | null)[] = [];
  const commits: (number | null)[] = [];
  render(
    defineComponent(
      () => () =>
        h(field, {
          ...rest,
          modelValue: model.value,
          'onUpdate:modelValue': (value: number | null) => {
            seen.push(value);
            model.value = value;
          },
          onCommit: (value: number | null) => commits.push(value),
        }),
    ),
  );
  return { field: screen.getByLabelText<HTMLInputElement>(props.label), model, seen, commits };
}
