import { Counter, Gauge, Histogram, Registry, collectDefaultMetrics } from 'prom-client';

/** Everything /metrics shows. */
export const metrics = new Registry();
collectDefaultMetrics({ register: metrics });

export const requestSeconds = new Histogram({
  name: 'tarewell_http_request_duration_seconds',
  help: 'Time to answer an API request',
  labelNames: ['method', 'route', 'status'] as const,
  buckets: [0.005, 0.01, 0.025, 0.05, 0.1, 0.25, 0.5, 1, 2.5, 5],
  registers: [metrics],
});

export const socketsOpen = new Gauge({
  name: 'tarewell_sockets_open',
  help: 'Open live connections of this process',
  registers: [metrics],
});

export const mailsQueued = new Gauge({
  name: 'tarewell_mails',
  help: 'Mails in the outbox by state',
  labelNames: ['state'] as const,
  registers: [metrics],
});

export const planSeconds = new Histogram({
  name: 'tarewell_plan_duration_seconds',
  help: 'Time to compute a pack plan',
  buckets: [0.005, 0.02, 0.05, 0.1, 0.3, 1, 2, 5, 20],
  registers: [metrics],
});

export const estimateMismatches = new Counter({
  name: 'tarewell_estimate_mismatches_total',
  help: "Browser estimates that differed from the server's result",
  registers: [metrics],
});
