import { createPinia, setActivePinia } from 'pinia';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import type { BuyChanged } from '#shared/schemas/live.ts';
import type { PledgeChange, SheetChanges } from '#shared/schemas/sheet.ts';
import { ids, mySheet, sheetReply } from '#tests/support/sheetReply.ts';
import { ApiProblem } from 'src/api/problem.ts';
import * as api from 'src/api/sheet.ts';
import { useSheetStore } from 'src/stores/sheet.ts';
import { cellKey } from 'src/stores/sheetRows.ts';

vi.mock('src/api/sheet.ts');
vi.mock('src/api/socket.ts', () => ({ joinRoom: vi.fn(), onConnection: vi.fn(), onLive: vi.fn() }));

const place = { club: 'quillmere', buy: ids.buy };
const pledge = (more: Partial<PledgeChange> = {}): PledgeChange => ({
  membershipId: ids.noor,
  name: 'Noor Valdane',
  guest: false,
  lineId: ids.epsom,
  wantedMg: 700_000,
  upToMg: null,
  version: 2,
  at: '2026-12-01T10:00:00.000Z',
  ...more,
});
const changed = (sheetVersion: number, more: Partial<PledgeChange> = {}): BuyChanged => ({
  kind: 'pledge',
  buyId: ids.buy,
  sheetVersion,
  pledge: pledge(more),
  total: null,
});

async function loaded(reply = sheetReply(), mine = mySheet()) {
  vi.mocked(api.getSheet).mockResolvedValue(reply);
  vi.mocked(api.getMySheet).mockResolvedValue(mine);
  const store = useSheetStore();
  await store.load(place);
  return store;
}

beforeEach(() => {
  vi.resetAllMocks();
  setActivePinia(createPinia());
});

describe('what is heard live', () => {
  it('applies the next change, drops older ones and other buys', async () => {
    const store = await loaded();
    const row = store.rows.get(ids.ravi);
    store.hearChange(changed(8));
    expect(store.cellOf(ids.noor, ids.epsom).wantedMg).toBe(700_000);
    expect(store.version).toBe(8);
    store.hearChange(changed(8, { wantedMg: 1000, version: 9 }));
    store.hearChange({ ...changed(9, { wantedMg: 1000, version: 9 }), buyId: ids.club });
    expect(store.cellOf(ids.noor, ids.epsom).wantedMg).toBe(700_000);
    expect(store.rows.get(ids.ravi)).toBe(row);
  });

  it('glows once where something changed', async () => {
    const store = await loaded();
    store.hearChange(changed(8));
    expect([...store.glows]).toEqual([cellKey(ids.noor, ids.epsom)]);
  });

  it('asks for the changes since its version after a gap', async () => {
    const store = await loaded();
    const changes: SheetChanges = {
      whole: false,
      sheetVersion: 12,
      pledges: [pledge({ wantedMg: 900_000, version: 5 })],
      totals: [],
      plan: null,
    };
    vi.mocked(api.getChanges).mockResolvedValue(changes);
    store.hearChange(changed(12));
    await vi.waitFor(() => expect(store.version).toBe(12));
    expect(api.getChanges).toHaveBeenCalledExactlyOnceWith(place, 7, 3);
    expect(store.cellOf(ids.noor, ids.epsom).wantedMg).toBe(900_000);
  });

  it('takes the whole sheet when the terms changed', async () => {
    const store = await loaded();
    const sheet = sheetReply({ sheetVersion: 9, members: [] });
    vi.mocked(api.getChanges).mockResolvedValue({ whole: true, sheet });
    store.hearChange({ kind: 'terms', buyId: ids.buy, sheetVersion: 8 });
    await vi.waitFor(() => expect(store.version).toBe(9));
    expect(store.rows.size).toBe(0);
  });

  it("puts the server's plan in place of its own, and reports a difference", async () => {
    const store = await loaded();
    await vi.waitFor(() => expect(store.sums?.lines[ids.epsom]?.boughtMg).toBe(5_000_000));
    const plan = store.sums!.plan;
    vi.mocked(api.postDefect).mockResolvedValue(undefined);
    store.hearPlan({ buyId: ids.buy, forVersion: 7, plan });
    expect(api.postDefect).not.toHaveBeenCalled();
    store.hearChange(changed(8));
    await vi.waitFor(() => expect(store.sums?.lines[ids.epsom]?.pooledMg).toBe(1_100_000));
    store.hearPlan({
      buyId: ids.buy,
      forVersion: 8,
      plan: { ...plan, packs: { [ids.bag]: 2, [ids.sack]: 1 } },
    });
    expect(api.postDefect).toHaveBeenCalledOnce();
    await vi.waitFor(() => expect(store.sums?.lines[ids.epsom]?.boughtMg).toBe(10_000_000));
  });

  it('shows only a total where the club shows no more', async () => {
    const total = { lineId: ids.potash, wantedMg: 1_600_000, roomMg: 0, members: 2 };
    const store = await loaded(sheetReply({ reader: 'totals', members: [], totals: [total] }));
    await vi.waitFor(() => expect(store.sums?.lines[ids.potash]?.pooledMg).toBe(1_600_000));
    const next = { ...total, wantedMg: 2_000_000 };
    store.hearChange({
      kind: 'pledge',
      buyId: ids.buy,
      sheetVersion: 8,
      pledge: null,
      total: next,
    });
    await vi.waitFor(() => expect(store.sums?.lines[ids.potash]?.pooledMg).toBe(2_000_000));
  });
});

describe('changing a pledge', () => {
  const own = (more: Partial<PledgeChange> = {}) =>
    pledge({ membershipId: ids.me, name: 'Imke', wantedMg: 600_000, ...more });

  it('shows it at once with the sums it makes, and keeps it', async () => {
    const store = await loaded();
    let answer = (_reply: Awaited<ReturnType<typeof api.putPledge>>) => {};
    vi.mocked(api.putPledge).mockReturnValue(new Promise((resolve) => (answer = resolve)));
    const saving = store.changePledge(ids.me, ids.epsom, { wantedMg: 600_000, upToMg: null });
    expect(store.saving).toBe(true);
    await vi.waitFor(() => expect(store.sums?.lines[ids.epsom]?.pooledMg).toBe(1_100_000));
    expect(api.putPledge).toHaveBeenCalledWith(place, ids.epsom, ids.me, {
      wantedMg: 600_000,
      upToMg: null,
      version: 1,
    });
    answer({ sheetVersion: 8, pledge: own(), proposed: false });
    await saving;
    expect(store.saving).toBe(false);
    expect(store.version).toBe(8);
    expect(store.cellOf(ids.me, ids.epsom)).toMatchObject({ wantedMg: 600_000, version: 2 });
  });

  it('takes it back with the reason when it is refused', async () => {
    const store = await loaded();
    const refusal = new ApiProblem({
      status: 409,
      code: 'closing_soon',
      title: 'No',
      detail: 'Ask them.',
    });
    vi.mocked(api.putPledge).mockRejectedValue(refusal);
    await expect(
      store.changePledge(ids.me, ids.epsom, { wantedMg: 100_000, upToMg: null }),
    ).rejects.toBe(refusal);
    expect(store.problems[cellKey(ids.me, ids.epsom)]).toBe('Ask them.');
    expect(store.cellOf(ids.me, ids.epsom).wantedMg).toBe(400_000);
    expect(store.saving).toBe(false);
  });

  it('shows what it is now when another screen was quicker', async () => {
    const store = await loaded();
    const current = own({ wantedMg: 450_000, version: 3 });
    vi.mocked(api.putPledge).mockRejectedValue(
      new ApiProblem({ status: 409, code: 'stale', title: 'No', current }),
    );
    await store
      .changePledge(ids.me, ids.epsom, { wantedMg: 600_000, upToMg: null })
      .catch(() => undefined);
    expect(store.cellOf(ids.me, ids.epsom)).toMatchObject({ wantedMg: 450_000, version: 3 });
  });

  it('sends changes of one cell one after the other, each with the version of its turn', async () => {
    const store = await loaded();
    vi.mocked(api.putPledge).mockImplementation((_to, _line, _member, body) =>
      Promise.resolve({
        sheetVersion: 7 + body.version,
        pledge: own({ wantedMg: body.wantedMg, version: body.version + 1 }),
        proposed: false,
      }),
    );
    await Promise.all([
      store.changePledge(ids.me, ids.epsom, { wantedMg: 500_000, upToMg: null }),
      store.changePledge(ids.me, ids.epsom, { wantedMg: 550_000, upToMg: null }),
    ]);
    const versions = vi.mocked(api.putPledge).mock.calls.map(([, , , body]) => body.version);
    expect(versions).toEqual([1, 2]);
    expect(store.cellOf(ids.me, ids.epsom).wantedMg).toBe(550_000);
  });
});
