import { defineBoot } from '#q-app/wrappers';
import { Notify } from 'quasar';
import { asProblem } from 'src/api/problem.ts';

export default defineBoot(({ app }) => {
  Notify.setDefaults({
    position: 'bottom',
    timeout: 5_000,
    classes: 'tw-notify',
    attrs: { role: 'status' },
  });

  const show = (error: unknown) => {
    const problem = asProblem(error);
    if (problem.status === 401) return;
    Notify.create({ type: 'negative', message: problem.title, caption: problem.detail });
  };

  // The last resort: a page that expects a refusal catches it and shows it beside the field.
  app.config.errorHandler = (error) => {
    show(error);
    throw error;
  };
  window.addEventListener('unhandledrejection', (event) => show(event.reason));
});
