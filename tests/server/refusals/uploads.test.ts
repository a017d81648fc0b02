import { describeRights } from '#tests/support/rights.ts';

// Who may see or add depends on the owner: tests/server/uploads/uploads.test.ts has that table.
describeRights('uploads', (route) => route.path.startsWith('/clubs/:club/uploads'), {
  'GET /clubs/:club/uploads': 'everyone',
  'POST /clubs/:club/uploads': 'everyone',
  'GET /clubs/:club/uploads/:upload/file': 'everyone',
  'DELETE /clubs/:club/uploads/:upload': 'everyone',
  'POST /clubs/:club/uploads/:upload/restore': 'everyone',
});
