/**
 * The layers and what each may not import. A block later in the list replaces an earlier one for
 * the same file, so each block carries its side's whole list.
 */

/** Matches `src/NAME/...`, `#server/NAME/...` and `../NAME/...` for each of the names. */
const layer = (...names) => `^(src|#server|\\.{1,2}(/\\.\\.)*)/(${names.join('|')})(/|\\.ts$|$)`;

const block = (files, message, ...regexes) => ({
  files,
  rules: {
    'no-restricted-imports': [
      'error',
      { patterns: regexes.map((regex) => ({ regex, message, caseSensitive: true })) },
    ],
  },
});

const notServer = '^#(server|seeds|tests)/|^(\\.\\./)+(server|seeds|tests)/';
const notSrc = '^src/|^(\\.\\./)+src/|^(#seeds|#tests)/|^(\\.\\./)+(seeds|tests)/';
const anyPackage = '^(?!\\.{1,2}/)';

const sharedSide = [
  block(
    ['shared/**'],
    'shared imports only shared and zod.',
    '^(?!\\.{1,2}/|zod$|@asteasolutions/)',
  ),
  block(['shared/domain/**'], 'shared/domain imports only shared/domain.', anyPackage, '/schemas/'),
];

const srcSide = [
  block(['src/**'], 'src never imports server, seeds or tests.', notServer),
  block(
    ['src/api/**'],
    'src/api imports only shared.',
    notServer,
    layer('stores', 'composables', 'components', 'pages', 'layouts', 'router', 'boot'),
  ),
  block(
    ['src/stores/**'],
    'A store imports api and shared.',
    notServer,
    layer('composables', 'components', 'pages', 'layouts', 'router', 'boot'),
  ),
  block(
    ['src/composables/**'],
    'A composable imports vue, quasar and shared.',
    notServer,
    layer('stores', 'components', 'pages', 'layouts', 'router', 'boot'),
    '^src/api/(?!problem)',
  ),
  block(
    ['src/components/**'],
    'A component imports its own store, composables and shared.',
    notServer,
    layer('pages', 'layouts', 'router', 'boot'),
    '^src/api/(?!problem)',
  ),
  block(
    ['src/components/common/**'],
    'A common component knows no store and no domain word.',
    notServer,
    layer('stores', 'pages', 'layouts', 'router', 'boot'),
    '^src/api/(?!problem)',
  ),
  block(
    ['src/pages/**'],
    'A page asks its store; it does not call the api.',
    notServer,
    layer('boot', 'layouts'),
    '^src/api/(?!problem)',
  ),
];

const serverSide = [
  block(['server/**'], 'server never imports src, seeds or tests.', notSrc),
  block(
    ['server/routes/**'],
    'A route imports middlewares, policies, services, presenters and shared.',
    notSrc,
    layer('models', 'migrations', 'sockets', 'jobs', 'storage', 'mail', 'payments'),
    '^sequelize$|^pg$',
  ),
  block(
    ['server/policies/**'],
    'A policy is pure: shared only.',
    notSrc,
    '^(?!\\./|#shared/|#server/policies/)',
  ),
  block(
    ['server/services/**'],
    'A service imports models, presenters, sockets, config and shared.',
    notSrc,
    layer('routes', 'middlewares'),
    '^express',
  ),
  block(
    ['server/models/**'],
    'A model imports config and shared.',
    notSrc,
    layer('routes', 'middlewares', 'services', 'presenters', 'sockets', 'jobs', 'mail'),
  ),
  block(
    ['server/migrations/**'],
    'A migration uses no model: models change, merged migrations do not.',
    notSrc,
    layer('models', 'services'),
  ),
  block(
    ['server/presenters/**'],
    'A presenter turns rows into wire types.',
    notSrc,
    layer('routes', 'middlewares', 'services', 'sockets', 'jobs', 'mail'),
  ),
  block(
    ['server/sockets/**', 'server/jobs/**', 'server/storage/**', 'server/mail/**'],
    'These import services, presenters, policies, models and config.',
    notSrc,
    layer('routes'),
  ),
  block(
    ['server/fakes/**'],
    'A fake speaks the real protocol and knows nothing of the app.',
    notSrc,
    '^#|^(\\.\\./)+',
  ),
];

const seedsSide = [
  block(['seeds/**'], 'seeds import server and shared.', '^src/|^#tests/|^(\\.\\./)+(src|tests)/'),
];

/** Same input, same result: no clock, no chance, no reader's locale in the domain. */
const purity = {
  files: ['shared/domain/**/*.ts'],
  rules: {
    'no-restricted-syntax': [
      'error',
      {
        selector: "NewExpression[callee.name='Date'][arguments.length=0]",
        message: 'The domain reads no clock: take the time as an argument.',
      },
      {
        selector: "MemberExpression[object.name='Date'][property.name='now']",
        message: 'The domain reads no clock: take the time as an argument.',
      },
      {
        selector: "MemberExpression[object.name='Math'][property.name='random']",
        message: 'The domain takes no chances.',
      },
    ],
    'no-restricted-globals': ['error', 'navigator', 'window', 'document', 'process'],
  },
};

export const layerRules = [...sharedSide, purity, ...srcSide, ...serverSide, ...seedsSide];
