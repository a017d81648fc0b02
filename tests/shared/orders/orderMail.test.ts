import { describe, expect, it } from 'vitest';
import { mailtoLink, orderMail } from '#shared/domain/orders/orderMail.ts';
import { exceedsLimit, nextAgreement } from '#shared/domain/orders/priceLimit.ts';

describe('the mail to a supplier', () => {
  const mail = orderMail({
    to: 'orders@grainmoor.example',
    supplier: 'Grainmoor Salts',
    club: 'Quillmere Water Gardeners',
    buy: 'Winter & spring',
    organiser: 'Noor Valdane',
    reference: 'Q-118',
    packs: [
      { packs: 2, pack: '25 kg', salt: 'Potassium nitrate', label: 'KN-25', price: '€95.00' },
    ],
    shipping: '€12.00',
    total: '€202.00',
  });

  it('names every pack, the shipping and the sum', () => {
    expect(mail.body).toContain('  2 x 25 kg Potassium nitrate (KN-25) at €95.00');
    expect(mail.body).toContain('Shipping as you told us: €12.00');
    expect(mail.body).toContain('your reference Q-118');
  });

  it('becomes a link whose words can’t break out of it', () => {
    const url = new URL(mailtoLink(mail));
    expect(url.pathname).toBe('orders@grainmoor.example');
    expect(url.searchParams.get('subject')).toBe(mail.subject);
    expect(url.searchParams.get('body')?.replace(/\r\n/g, '\n')).toBe(mail.body);
    expect([...url.searchParams.keys()]).toEqual(['subject', 'body']);
    const odd = mailtoLink({ to: 'a@b.example?bcc=x@y.example', subject: '', body: '' });
    expect(odd).toMatch(/^mailto:a@b\.example%3Fbcc/);
  });
});

describe('the price limit', () => {
  it('is passed above it, not at it', () => {
    expect(exceedsLimit(1100, 1000, 100)).toBe(false);
    expect(exceedsLimit(1101, 1000, 100)).toBe(true);
    expect(exceedsLimit(1, 0, 100)).toBe(true);
    expect(exceedsLimit(0, 0, 100)).toBe(false);
    expect(exceedsLimit(1001, 1000, 0)).toBe(true);
  });

  it('keeps an agreement for any share up to it, and asks anew above', () => {
    const none = { overLimitMinor: null, agreed: false };
    expect(nextAgreement(none, 1050, 1000, 100)).toEqual(none);
    expect(nextAgreement(none, 1200, 1000, 100)).toEqual({ overLimitMinor: 1200, agreed: false });
    const agreed = { overLimitMinor: 1200, agreed: true };
    expect(nextAgreement(agreed, 1150, 1000, 100)).toEqual(agreed);
    expect(nextAgreement(agreed, 1201, 1000, 100)).toEqual({ overLimitMinor: 1201, agreed: false });
    expect(nextAgreement(agreed, 1000, 1000, 100)).toEqual(none);
  });
});
