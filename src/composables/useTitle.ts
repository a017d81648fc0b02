import { toValue, watchEffect, type MaybeRefOrGetter } from 'vue';

/** The document's title for a page: the most particular part first. */
export const makeTitle = (...parts: (string | null | undefined)[]) =>
  [...parts, 'Tarewell'].filter(Boolean).join(' · ');

/** Names the document after what the page shows, as soon as it is known. */
export function useTitle(...parts: MaybeRefOrGetter<string | null | undefined>[]) {
  watchEffect(() => {
    const named = parts.map((part) => toValue(part)).filter(Boolean);
    if (named.length > 0) document.title = makeTitle(...named);
  });
}
