import { defineAsyncComponent, type Component } from 'vue';

const TRIES = 6;

/** A part that is loaded when it is first shown, tried again for about a minute while the network is away. */
export const lazyPart = <Part extends Component>(
  loader: () => Promise<Part | { default: Part }>,
  whenLost?: () => void,
): Part =>
  defineAsyncComponent<Part>({
    loader: loader as () => Promise<Part>,
    onError: (error, retry, fail, tries) => {
      if (tries < TRIES) {
        setTimeout(retry, 1_000 * 2 ** (tries - 1));
        return;
      }
      whenLost?.();
      fail();
    },
  });

/** Fetches a part ahead, when a pointer or the focus comes near; what fails is tried again when it is shown. */
export const warm = (loader: () => Promise<unknown>) => () => void loader().catch(() => undefined);
