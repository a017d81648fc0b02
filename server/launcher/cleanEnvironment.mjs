const ours =
  /^(HOST|PORT|DATABASE_(URL|POOL)|TAREWELL_.*|SMTP_URL|MAIL_FROM|PUBLIC_URL|SESSION_SECRET|METRICS_TOKEN|S3_.*|STRIPE_.*|LOG_LEVEL|NODE_ENV)$/;

/**
 * @returns the environment without the settings of a real installation, so that a test, benchmark
 * or picture can't write to its database or send its mail
 */
export const cleanEnvironment = () =>
  Object.fromEntries(Object.entries(process.env).filter(([name]) => !ours.test(name)));
