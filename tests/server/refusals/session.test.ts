import { describeRights } from '#tests/support/rights.ts';

describeRights('session', (route) => route.path.startsWith('/session'), {
  'GET /session': 'anyone',
  'POST /session': 'anyone',
  'DELETE /session': 'anyone',
});
