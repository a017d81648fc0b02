import { beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { ImportPreview, ImportRules } from '#shared/schemas/offerImport.ts';
import type { Offer, SupplierPage } from '#shared/schemas/suppliers.ts';
import { select } from '#server/config/database.ts';
import { Supplier } from '#server/models/Supplier.ts';
import type { Agent } from '#tests/support/client.ts';
import { makeWorld, type World } from '#tests/support/world.ts';

const rules: ImportRules = {
  columns: null,
  decimalMark: null,
  packUnit: null,
  priceIncludesTax: true,
  taxRatePpm: 190_000,
};
const good = 'Artikel;Gebinde;Preis\r\nKNO3;25 kg;84,00\r\nMgSO4·7H2O;5 kg;12,50\r\n';

let world: World;
let agent: Agent;
let url: string;
let count = 0;

beforeAll(async () => {
  world = await makeWorld('open');
  agent = await world.people.organiser.agent();
});
beforeEach(async () => {
  count += 1;
  const supplier = await Supplier.create({
    clubId: world.club.id,
    name: `Supplier ${count}`,
    shipping: { kind: 'flat', minor: 0 },
  });
  url = `/api/v1/clubs/${world.club.slug}/suppliers/${supplier.id}`;
});

const post = (path: string, text: string | Buffer, fields: Record<string, string>) =>
  agent.post(`${url}/${path}`).field(fields).attach('file', Buffer.from(text), 'offers.csv');

async function preview(
  text: string | Buffer,
  changed: Partial<ImportRules> = {},
): Promise<ImportPreview> {
  const { body } = await post('import/preview', text, {
    rules: JSON.stringify({ ...rules, ...changed }),
  }).expect(200);
  return body as ImportPreview;
}

const confirm = (text: string, seen: string, leaveOutBad = 'no') =>
  post('import', text, { rules: JSON.stringify(rules), seen, leaveOutBad });

async function offers(): Promise<Offer[]> {
  const { body } = await agent.get(url).expect(200);
  return (body as SupplierPage).offers;
}

describe('import of offers', () => {
  it('previews without saving, then saves what was seen', async () => {
    const seen = await preview(good);
    expect(seen).toMatchObject({
      delimiter: ';',
      rules: { columns: { salt: 0, pack: 1, price: 2 }, decimalMark: 'comma', packUnit: 'kg' },
      missing: [],
      counts: { new: 2, change: 0, same: 0, bad: 0 },
    });
    expect(seen.rows[0]).toMatchObject({
      line: 2,
      kind: 'new',
      saltName: 'Potassium nitrate',
      offer: { priceMinor: 8400, taxRatePpm: 190_000 },
    });
    expect(await offers()).toEqual([]);
    const { body } = await confirm(good, seen.seen).expect(200);
    expect(body).toEqual({ added: 2, changed: 0, same: 0, leftOut: 0 });
    expect(
      (await offers()).map(({ saltId, packMg, priceMinor }) => [saltId, packMg, priceMinor]),
    ).toEqual([
      ['KNO3', 25_000_000, 8400],
      ['MgSO4.7H2O', 5_000_000, 1250],
    ]);
  });

  it('knows the same pack again: changed, the same, or new', async () => {
    await confirm(good, (await preview(good)).seen).expect(200);
    const next =
      'Artikel;Gebinde;Preis;Bestand\nKNO3;25 kg;91,00;\nMgSO4.7H2O;5000 g;12,50;\nK2SO4;1 kg;4,20;30\n';
    const seen = await preview(next);
    expect(seen.rows.map(({ kind, beforeMinor }) => [kind, beforeMinor])).toEqual([
      ['change', 8400],
      ['same', 1250],
      ['new', null],
    ]);
    await confirm(next, seen.seen).expect(200);
    const kno3 = (await offers()).find(({ saltId }) => saltId === 'KNO3');
    expect(kno3).toMatchObject({ priceMinor: 9100, version: 2 });
    const { body } = await agent.get(`${url}/offers/${kno3?.id}/prices`).expect(200);
    expect(
      (body as { prices: { priceMinor: number }[] }).prices.map((one) => one.priceMinor),
    ).toEqual([9100, 8400]);
    const again = await confirm(next, (await preview(next)).seen).expect(422);
    expect(again.body).toMatchObject({
      errors: { file: expect.stringContaining('nothing to save') },
    });
  });

  it('shows every bad row with its reasons and saves nothing until they are left out', async () => {
    const bad = `${good}sugar;25 kg;1,00\nKNO3;25 kg;80,00\nKCl;a sack;x\nNaCl;1 kg;2,00;extra\n`;
    const seen = await preview(bad);
    expect(seen.counts).toEqual({ new: 2, change: 0, same: 0, bad: 4 });
    const problems = seen.rows
      .filter((row) => row.kind === 'bad')
      .map(({ line, errors }) => [line, Object.keys(errors)]);
    expect(problems).toEqual([
      [4, ['salt']],
      [5, ['row']],
      [6, ['pack', 'price']],
      [7, ['row']],
    ]);
    const refused = await confirm(bad, seen.seen).expect(422);
    expect(refused.body).toMatchObject({
      errors: { leaveOutBad: expect.stringContaining('4 rows') },
    });
    expect(await offers()).toEqual([]);
    const { body } = await confirm(bad, seen.seen, 'yes').expect(200);
    expect(body).toEqual({ added: 2, changed: 0, same: 0, leftOut: 4 });
  });

  it('refuses what changed since the preview, with the new preview', async () => {
    const seen = await preview(good);
    await agent
      .post(`${url}/offers`)
      .send({
        saltId: 'KNO3',
        label: '',
        packMg: 25_000_000,
        priceMinor: 1,
        priceIncludesTax: true,
        taxRatePpm: 0,
        stockPacks: null,
        multipleOf: 1,
        link: '',
      })
      .expect(201);
    const { body } = await confirm(good, seen.seen).expect(409);
    expect(body).toMatchObject({ code: 'stale', current: { counts: { new: 1, change: 1 } } });
    expect(await offers()).toHaveLength(1);
  });

  it('saves twice-sent confirmations once', async () => {
    const { seen } = await preview(good);
    const replies = await Promise.all([confirm(good, seen), confirm(good, seen)]);
    expect(replies.map(({ status }) => status).sort()).toEqual([200, 409]);
    expect(await offers()).toHaveLength(2);
  });

  it.each([
    ['commas and points', 'Salt,Pack,Price\nKNO3,25 kg,84.00\n', 8400],
    ['tabs', 'Salt\tPack\tPrice\nKNO3\t25 kg\t84.00\n', 8400],
    ['quoted commas', 'Salt,Pack,Price\n"Potassium nitrate, prills","25 kg","84,00"\n', 8400],
    ['a byte order mark', '\ufeffSalt;Pack;Price\nKNO3;25 kg;84,00\n', 8400],
    ['thousands', 'Salt;Pack;Price\nKNO3;25 kg;1.284,00\n', 128_400],
  ])('reads a table with %s', async (_what, text, priceMinor) => {
    expect((await preview(text)).rows[0]).toMatchObject({
      kind: 'new',
      offer: { saltId: 'KNO3', packMg: 25_000_000, priceMinor },
    });
  });

  it('reads Windows-1252 and UTF-16', async () => {
    const text = 'Salz;Gebinde;Preis;Qualität\nKNO3;25 kg;84,00;grün\n';
    const windows = Buffer.from(text, 'latin1');
    const wide = Buffer.concat([Buffer.from([0xff, 0xfe]), Buffer.from(text, 'utf16le')]);
    for (const bytes of [windows, wide]) {
      expect((await preview(bytes)).rows[0]?.offer?.label).toBe('grün');
    }
  });

  it('asks for the decimal mark where a price can mean two numbers', async () => {
    const text = 'Salt;Pack;Price\nKNO3;25 kg;1.200\n';
    const open = await preview(text);
    expect(open.rows[0]?.errors.price).toContain('Choose the decimal mark');
    expect((await preview(text, { decimalMark: 'comma' })).rows[0]?.offer?.priceMinor).toBe(
      120_000,
    );
    expect((await preview(text, { decimalMark: 'point' })).rows[0]?.offer?.priceMinor).toBe(120);
  });

  it('takes columns as chosen, and says which are missing', async () => {
    const text = 'A;B;C\n84,00;KNO3;25\n';
    expect((await preview(text)).missing).toEqual(['salt', 'pack', 'price']);
    const seen = await preview(text, { columns: { price: 0, salt: 1, pack: 2 }, packUnit: 'kg' });
    expect(seen.rows[0]).toMatchObject({
      kind: 'new',
      offer: { saltId: 'KNO3', packMg: 25_000_000 },
    });
  });

  it.each([
    ['nothing', ''],
    ['one column', 'Salt\nKNO3\n'],
    ['a header alone', 'Salt;Pack;Price\n'],
    ['an open quotation mark', 'Salt;Pack;Price\n"KNO3;25 kg;84,00\n'],
    ['no text', Buffer.from([0, 1, 2, 3])],
    ['too many rows', `Salt;Pack;Price\n${'KNO3;25 kg;84,00\n'.repeat(2001)}`],
  ])('refuses a file with %s at the file', async (_what, text) => {
    const { body } = await post('import/preview', text, { rules: JSON.stringify(rules) }).expect(
      422,
    );
    expect(Object.keys((body as { errors: object }).errors)).toEqual(['file']);
  });

  it('saves a long table within seconds', async () => {
    const rows = Array.from({ length: 2000 }, (_, index) => `KNO3;${index + 1} g;1,00`).join('\n');
    const text = `Salt;Pack;Price\n${rows}\n`;
    const before = performance.now();
    await confirm(text, (await preview(text)).seen).expect(200);
    expect(await offers()).toHaveLength(2000);
    expect(performance.now() - before).toBeLessThan(20_000);
  });

  it('tells an open buy once, however many offers changed', async () => {
    await confirm(good, (await preview(good)).seen).expect(200);
    const id = url.split('/').pop();
    await select('update lines set any_of_supplier_id = :id where id = :lineId returning id', {
      id,
      lineId: world.line.id,
    });
    const before = await select('select id from terms_changes where buy_id = :buyId', {
      buyId: world.buy.id,
    });
    const next = 'Salt;Pack;Price\nKNO3;25 kg;91,00\nKNO3;5 kg;20,00\nKNO3;1 kg;5,00\n';
    await confirm(next, (await preview(next)).seen).expect(200);
    const after = await select<{ summary: string }>(
      'select summary from terms_changes where buy_id = :buyId order by terms_version',
      { buyId: world.buy.id },
    );
    expect(after).toHaveLength(before.length + 1);
    expect(after.at(-1)?.summary).toContain('rose from €84.00 to €91.00');
    expect(after.at(-1)?.summary).toContain('New: 5');
  });
});

describe('export of offers', () => {
  it('gives back what import reads, and no spreadsheet takes a cell for a formula', async () => {
    const offer = {
      saltId: 'KNO3',
      label: '=cmd()',
      packMg: 250_000,
      priceMinor: 305,
      priceIncludesTax: false,
      taxRatePpm: 77_000,
      stockPacks: 3,
      multipleOf: 2,
      link: 'https://brook.example/a?b=1',
    };
    await agent.post(`${url}/offers`).send(offer).expect(201);
    const { text, headers } = await agent.get(`${url}/offers.csv`).expect(200);
    expect(headers['content-disposition']).toContain('attachment');
    expect(text).toContain(",'=cmd(),");
    expect(text).not.toMatch(/(^|[,\n])[=+\-@]/m);
    expect((await preview(text)).rows).toMatchObject([{ kind: 'same', offer: { ...offer } }]);
  });

  it('offers a template that import reads', async () => {
    const { text } = await agent
      .get(`/api/v1/clubs/${world.club.slug}/suppliers/import-template.csv`)
      .expect(200);
    expect((await preview(text)).counts).toEqual({ new: 2, change: 0, same: 0, bad: 0 });
  });
});
