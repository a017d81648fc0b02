import { defineBoot } from '#q-app/wrappers';
import { Notify } from 'quasar';
import { notifyProblem } from 'src/composables/useNotify.ts';

export default defineBoot(({ app }) => {
  Notify.setDefaults({
    position: 'bottom',
    timeout: 5_000,
    classes: 'tw-notify',
    attrs: { role: 'status' },
  });

  // The last resort: a page that expects a refusal catches it and shows it beside the field.
  app.config.errorHandler = (error) => {
    notifyProblem(error);
    throw error;
  };
  window.addEventListener('unhandledrejection', (event) => notifyProblem(event.reason));
});
