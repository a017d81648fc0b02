import sharp from 'sharp';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Upload } from '#shared/schemas/uploads.ts';
import { select } from '#server/config/database.ts';
import { Offer } from '#server/models/Offer.ts';
import { Supplier } from '#server/models/Supplier.ts';
import { makeWorld, type World } from '#tests/support/world.ts';

type Part = keyof World['people'];

let world: World;
let url: string;
let owners: Record<string, string>;
let photo: Buffer;

const pdf = Buffer.from(
  '%PDF-1.4\n1 0 obj<</Type/Catalog>>endobj\ntrailer<</Root 1 0 R>>\n%%EOF\n',
);
const csv = Buffer.from('salt;pack;price\nKNO3;25 kg;84,00\n');

async function one(sql: string): Promise<string> {
  const [row] = await select<{ id: string }>(sql, {
    buyId: world.buy.id,
    lineId: world.line.id,
    byId: world.people.own.membership.id,
  });
  return row?.id ?? '';
}

beforeAll(async () => {
  world = await makeWorld('arrived');
  url = `/api/v1/clubs/${world.club.slug}/uploads`;
  const clubId = world.club.id;
  const supplier = await Supplier.create({
    clubId,
    name: 'Brook & Stone',
    shipping: { kind: 'flat', minor: 0 },
  });
  const offer = await Offer.create({
    clubId,
    supplierId: supplier.id,
    saltId: 'KNO3',
    packMg: 25_000_000,
    priceMinor: 8400,
  });
  const order = await one(
    `insert into supplier_orders (buy_id, supplier_id, packs, goods_minor, shipping_minor)
     values (:buyId, '${supplier.id}', '[]', 0, 0) returning id`,
  );
  owners = {
    supplier: supplier.id,
    offer: offer.id,
    buy: world.buy.id,
    line: world.line.id,
    supplier_order: order,
    bag: await one(
      `insert into bags (buy_id, line_id, supplier_order_id, offer_id, number, nominal_mg)
       values (:buyId, :lineId, '${order}', '${offer.id}', 1, 25000000) returning id`,
    ),
    bill: await one(
      `insert into bills (buy_id, supplier_order_id, billed_on, lines, goods_minor, charges_minor, total_minor, paid_by, entered_by_id)
       values (:buyId, '${order}', '2026-01-05', '[]', 0, 0, 0, 'club', :byId) returning id`,
    ),
  };
  photo = await sharp({ create: { width: 60, height: 40, channels: 3, background: '#7a2e46' } })
    .withExif({
      IFD0: { Make: 'Camera maker', Software: 'Phone' },
      IFD3: { GPSLatitude: '52/1 31/1 0/1', GPSLatitudeRef: 'N' },
    })
    .withMetadata({ orientation: 6 })
    .jpeg()
    .toBuffer();
});

async function add(
  part: Part,
  owner: string,
  file: { bytes: Buffer; name: string } | null = { bytes: pdf, name: 'list.pdf' },
  purpose = 'photo',
) {
  const agent = await world.people[part].agent();
  const request = agent
    .post(url)
    .field('ownerType', owner)
    .field('ownerId', owners[owner] ?? '')
    .field('purpose', purpose);
  return file ? request.attach('file', file.bytes, file.name) : request;
}

async function fileOf(upload: Upload, part: Part = 'member') {
  const agent = await world.people[part].agent();
  return agent
    .get(`${url}/${upload.id}/file`)
    .buffer(true)
    .parse((res, done) => {
      const chunks: Buffer[] = [];
      res.on('data', (chunk: Buffer) => chunks.push(chunk));
      res.on('end', () => done(null, Buffer.concat(chunks)));
    });
}

/** Who may add to each owner; everyone else in the club is refused. */
const mayAdd: Record<string, readonly Part[]> = {
  supplier: ['organiser', 'own', 'steward'],
  offer: ['organiser', 'own', 'steward'],
  buy: ['own'],
  line: ['own'],
  bag: ['own', 'helper', 'cashHelper'],
  bill: ['own', 'treasurer'],
  supplier_order: ['own'],
};
const onlyForMoney = ['bill', 'supplier_order'];
const everyone: readonly Part[] = [
  'member',
  'organiser',
  'own',
  'treasurer',
  'steward',
  'helper',
  'cashHelper',
];

describe.each(Object.keys(mayAdd))('files of a %s', (owner) => {
  const see = (part: Part) =>
    !onlyForMoney.includes(owner) || part === 'own' || part === 'treasurer';

  it.each(everyone)('%s', async (part) => {
    const may = mayAdd[owner]?.includes(part) ?? false;
    const reply = await add(part, owner);
    expect(reply.status).toBe(may ? 201 : see(part) ? 403 : 404);
    const agent = await world.people[part].agent();
    const list = await agent.get(url).query({ ownerType: owner, ownerId: owners[owner] });
    expect(list.status).toBe(see(part) ? 200 : 404);
    if (see(part)) expect(list.body).toMatchObject({ may: { add: may } });
  });

  it('shows, removes and brings back by the same rule', async () => {
    const upload = (await add('own', owner)).body as Upload;
    for (const part of everyone) {
      expect((await fileOf(upload, part)).status).toBe(see(part) ? 200 : 404);
    }
    const other = await world.people.helper.agent();
    const mayHelper = mayAdd[owner]?.includes('helper') ?? false;
    const refused = await other.delete(`${url}/${upload.id}`);
    expect(refused.status).toBe(mayHelper ? 200 : see('helper') ? 403 : 404);
    const agent = await world.people.own.agent();
    await agent.delete(`${url}/${upload.id}`).expect(200);
    expect((await fileOf(upload, 'own')).status).toBe(404);
    await agent.post(`${url}/${upload.id}/restore`).expect(200);
    expect((await fileOf(upload, 'own')).status).toBe(200);
  });

  it('is nothing to another club', async () => {
    const upload = (await add('own', owner)).body as Upload;
    const stranger = await world.people.stranger.agent();
    const { body } = await stranger.get('/api/v1/session');
    const slug = (body as { memberships: { clubSlug: string }[] }).memberships[0]?.clubSlug;
    await stranger.get(`/api/v1/clubs/${slug}/uploads/${upload.id}/file`).expect(404);
    await stranger
      .post(`/api/v1/clubs/${slug}/uploads`)
      .field({ ownerType: owner, ownerId: owners[owner] ?? '', purpose: 'photo' })
      .attach('file', pdf, 'x.pdf')
      .expect(404);
  });
});

describe('what is kept', () => {
  it('draws images anew: upright, without place or camera', async () => {
    const before = await sharp(photo).metadata();
    expect(before.exif?.toString('latin1')).toContain('Camera maker');
    expect(before.orientation).toBe(6);
    const upload = (await add('own', 'bag', { bytes: photo, name: 'IMG_1.jpg' })).body as Upload;
    const { body, headers } = await fileOf(upload);
    const after = await sharp(body as Buffer).metadata();
    expect(after).toMatchObject({ format: 'jpeg', width: 40, height: 60 });
    expect([after.exif, after.xmp, after.iptc, after.orientation]).toEqual([
      undefined,
      undefined,
      undefined,
      undefined,
    ]);
    expect((body as Buffer).includes('Camera maker')).toBe(false);
    expect(headers['content-disposition']).toMatch(/^inline; filename="IMG_1.jpg"/);
  });

  it('serves so that nothing in it runs', async () => {
    const upload = (await add('own', 'offer', { bytes: csv, name: 'prices.csv' }, 'price_list'))
      .body as Upload;
    const { body, headers } = await fileOf(upload);
    expect((body as Buffer).equals(csv)).toBe(true);
    expect(headers['content-type']).toMatch(/^text\/csv/);
    expect(headers['content-disposition']).toMatch(/^attachment/);
    expect(headers['x-content-type-options']).toBe('nosniff');
    expect(headers['content-security-policy']).toBe("default-src 'none'; sandbox");
    expect(headers['cache-control']).toBe('private, no-cache');
  });

  it('tells the type by content and names the file after it', async () => {
    const png = await sharp({ create: { width: 2, height: 2, channels: 4, background: '#0000' } })
      .png()
      .toBuffer();
    const asExe = (await add('own', 'bag', { bytes: png, name: '../../evil.exe' })).body as Upload;
    expect(asExe).toMatchObject({ contentType: 'image/png', fileName: 'evil.png' });
    const named = (await add('own', 'bag', { bytes: pdf, name: 'Größe – Prüfung.pdf' }))
      .body as Upload;
    expect(named.fileName).toBe('Größe – Prüfung.pdf');
    const { headers } = await fileOf(named);
    expect(headers['content-disposition']).toContain(
      `filename*=UTF-8''${encodeURIComponent('Größe – Prüfung.pdf')}`,
    );
  });

  it.each([
    ['a page', Buffer.from('<html><script>alert(1)</script></html>'), 'list.csv'],
    [
      'a drawing that can hold scripts',
      Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"><script/></svg>'),
      'a.png',
    ],
    [
      'a program',
      Buffer.from('\x7fELF\x02\x01\x01aaaaaaaaaaaaaaaaaaaaaaaa', 'latin1'),
      'photo.jpg',
    ],
    ['an archive', Buffer.from('PK\x03\x04aaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaa', 'latin1'), 'x.pdf'],
    ['plain prose', Buffer.from('Dear club, here are our prices.'), 'list.csv'],
  ])('refuses %s', async (_what, bytes, name) => {
    const reply = await add('own', 'bag', { bytes, name });
    expect(reply.status).toBe(415);
    expect(reply.body).toMatchObject({ code: 'wrong_type', errors: { file: expect.any(String) } });
  });

  it('refuses half an image, nothing, and more than 10 MB', async () => {
    const half = await add('own', 'bag', {
      bytes: photo.subarray(0, photo.length / 2),
      name: 'half.jpg',
    });
    expect(half.status).toBe(422);
    expect((await add('own', 'bag', null)).status).toBe(422);
    expect((await add('own', 'bag', { bytes: Buffer.alloc(0), name: 'x.pdf' })).status).toBe(422);
    const large = await add('own', 'bag', {
      bytes: Buffer.alloc(10 * 1024 * 1024 + 1, 1),
      name: 'x.pdf',
    });
    expect(large.status).toBe(413);
    const agent = await world.people.own.agent();
    const wrong = await agent
      .post(url)
      .field('ownerType', 'planet')
      .attach('file', pdf, 'x.pdf')
      .expect(422);
    expect(Object.keys((wrong.body as { errors: object }).errors).sort()).toEqual([
      'ownerId',
      'ownerType',
      'purpose',
    ]);
  });

  it('writes who added and removed what', async () => {
    const rows = await select<{ action: string; actor_name: string }>(
      "select action, actor_name from audit_entries where club_id = :clubId and action like 'uploads.%'",
      { clubId: world.club.id },
    );
    expect(new Set(rows.map((row) => row.action))).toEqual(
      new Set(['uploads.add', 'uploads.remove', 'uploads.restore']),
    );
  });
});
