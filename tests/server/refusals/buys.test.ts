import { buyPeopleRoutes } from '#server/routes/buyPeople.ts';
import { buysRoutes } from '#server/routes/buys.ts';
import { buyTermsRoutes } from '#server/routes/buyTerms.ts';
import { handOnsRoutes } from '#server/routes/handOns.ts';
import { describeRights } from '#tests/support/rights.ts';

const routes = [...buysRoutes, ...buyTermsRoutes, ...buyPeopleRoutes, ...handOnsRoutes];
const buy = '/clubs/:club/buys/:buy';

describeRights('buys', (route) => routes.includes(route), {
  'GET /clubs/:club/buys': 'everyone',
  'POST /clubs/:club/buys': ['organiser', 'own'],
  [`GET ${buy}`]: 'everyone',
  [`POST ${buy}/copies`]: ['organiser', 'own'],
  [`POST ${buy}/open`]: ['own'],
  [`POST ${buy}/cancel`]: ['own'],
  [`DELETE ${buy}`]: ['own'],
  [`POST ${buy}/restore`]: ['own'],
  [`GET ${buy}/terms`]: ['own'],
  [`PATCH ${buy}/terms`]: ['own'],
  [`GET ${buy}/line-choices`]: ['own'],
  [`POST ${buy}/lines`]: ['own'],
  [`PUT ${buy}/lines/order`]: ['own'],
  [`PUT ${buy}/lines/:line`]: ['own'],
  [`DELETE ${buy}/lines/:line`]: ['own'],
  [`POST ${buy}/lines/:line/restore`]: ['own'],
  [`POST ${buy}/charges`]: ['own'],
  [`PUT ${buy}/charges/:charge`]: ['own'],
  [`DELETE ${buy}/charges/:charge`]: ['own'],
  [`POST ${buy}/charges/:charge/restore`]: ['own'],
  [`GET ${buy}/candidates`]: 'everyone',
  [`PUT ${buy}/organisers/:member`]: ['own'],
  [`DELETE ${buy}/organisers/:member`]: ['own'],
  [`PUT ${buy}/helpers/:member`]: ['own'],
  [`DELETE ${buy}/helpers/:member`]: ['own'],
  [`PUT ${buy}/responsibility/offer`]: ['own'],
  [`DELETE ${buy}/responsibility/offer`]: ['own'],
  [`POST ${buy}/responsibility/answer`]: ['organiser', 'own'],
  [`PUT ${buy}/responsibility`]: ['steward'],
  [`GET ${buy}/hand-ons`]: 'everyone',
  // Nobody of this world has a pledge, so nobody has a line to hand on.
  [`POST ${buy}/hand-ons`]: [],
  [`POST ${buy}/hand-ons/:handOn/answer`]: 'everyone',
  [`DELETE ${buy}/hand-ons/:handOn`]: [],
});
