import { describe, expect, it } from 'vitest';
import { allRoutes } from '#server/routes/index.ts';
import { openApiDocument } from '#server/routes/openapi.ts';
import { browser } from '#tests/support/client.ts';

describe('operations', () => {
  it('is alive and ready', async () => {
    await browser().get('/healthz').expect(200, { status: 'ok' });
    await browser().get('/readyz').expect(200, { status: 'ready' });
  });

  it('shows metrics on loopback, and not to whoever comes through a proxy', async () => {
    await browser().get('/api/v1/session').expect(200);
    const { text } = await browser().get('/metrics').expect(200);
    expect(text).toMatch(/tarewell_http_request_duration_seconds_count\{[^}]*route="\/session"/);
    await browser().get('/metrics').set('X-Forwarded-For', '203.0.113.9').expect(404);
  });

  it('describes every route', async () => {
    const document = openApiDocument(allRoutes);
    const described = Object.entries(document.paths ?? {}).flatMap(([path, item]) =>
      Object.keys(item as object).map((method) => `${method} ${path}`),
    );
    expect(described).toHaveLength(allRoutes.length);
    const { body } = await browser().get('/api/v1/openapi.json').expect(200);
    expect(body.openapi).toBe('3.1.0');
    await browser().get('/api/docs').expect(200).expect('Content-Type', /html/);
    await browser().get('/api/docs/swagger-ui.css').expect(200);
  });

  it('answers an unknown address with a problem document', async () => {
    const { body, headers } = await browser().get('/api/v1/nothing').expect(404);
    expect(headers['content-type']).toContain('application/problem+json');
    expect(body).toMatchObject({ status: 404, code: 'not_found' });
    await browser().post('/api/v1/session').type('json').send('{"broken').expect(400);
  });

  it('sets safe headers', async () => {
    const { headers } = await browser().get('/api/v1/session').expect(200);
    expect(headers['content-security-policy']).toContain("script-src 'self'");
    expect(headers['content-security-policy']).not.toContain('unsafe-inline');
    expect(headers['x-content-type-options']).toBe('nosniff');
    expect(headers['x-powered-by']).toBeUndefined();
  });
});
