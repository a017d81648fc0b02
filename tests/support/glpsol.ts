import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { PackOffer, PackRequest, PackSupplier } from '#shared/index.ts';

/** What glpsol made of a model. */
export type Solved = { status: string; objective: number; values: Map<string, number>; ms: number };

/**
 * Runs GLPK's solver on a model file's text.
 *
 * @param format `lp` (CPLEX LP) or `math` (GMPL)
 * @throws Error naming the Debian package when glpsol isn't installed
 */
export function glpsol(
  text: string,
  format: 'lp' | 'math',
  options: { seconds?: number } = {},
): Solved {
  const folder = mkdtempSync(join(tmpdir(), 'glpsol-'));
  try {
    const model = join(folder, 'model');
    const report = join(folder, 'report');
    writeFileSync(model, text);
    const limit = options.seconds ? ['--tmlim', String(options.seconds)] : [];
    const started = performance.now();
    const run = spawnSync('glpsol', [`--${format}`, model, '--cuts', ...limit, '-o', report], {
      encoding: 'utf8',
    });
    const ms = performance.now() - started;
    if (run.error) {
      throw new Error(
        'glpsol did not start: install the Debian package glpk-utils (apt-get install glpk-utils)',
        { cause: run.error },
      );
    }
    if (run.status !== 0) throw new Error(`glpsol failed: ${run.stdout}${run.stderr}`);
    return { ...readReport(readFileSync(report, 'utf8')), ms };
  } finally {
    rmSync(folder, { recursive: true });
  }
}

function readReport(report: string): Omit<Solved, 'ms'> {
  const status = /^Status:\s+(.+)$/m.exec(report)?.[1] ?? '';
  const objective = Number(/^Objective:\s+\S+ = (\S+)/m.exec(report)?.[1]);
  const values = new Map<string, number>();
  const columns = report.slice(report.indexOf('Column name'));
  // Long names stand on a line of their own, the figures on the next.
  for (const [, name = '', value] of columns.matchAll(/^\s*\d+ (\S+)\s+\*?\s+(-?[\d.e+-]+)/gm)) {
    values.set(name, Number(value));
  }
  return { status, objective, values };
}

/** More packs of this offer than any sensible plan holds. */
function mostPacks(offer: PackOffer, need: number, supplier: PackSupplier): number {
  const { shipping, minimumOrderMinor = 0, freeShippingFromMinor = 0 } = supplier;
  const last = shipping.kind === 'byValue' ? (shipping.steps.at(-2)?.upTo ?? 0) + 1 : 0;
  const value = Math.max(minimumOrderMinor, freeShippingFromMinor, last);
  const enough = Math.ceil(need / offer.packMg) + Math.ceil(value / Math.max(1, offer.priceMinor));
  const multiple = offer.multipleOf ?? 1;
  const cap = Math.ceil(enough / multiple) * multiple;
  return Math.min(offer.maxPacks ?? cap, cap);
}

type Region = { cost: number; value: [number, number]; mass: [number, number] };

/** Where each price of shipping applies, straight from the supplier's terms. */
function regions(supplier: PackSupplier): Region[] {
  const { shipping, minimumOrderMinor: least = 0, freeShippingFromMinor } = supplier;
  const free = freeShippingFromMinor ?? Infinity;
  const found: Region[] = [];
  if (free < Infinity) {
    found.push({ cost: 0, value: [Math.max(free, least), Infinity], mass: [0, Infinity] });
  }
  const steps = shipping.kind === 'flat' ? [{ upTo: null, minor: shipping.minor }] : shipping.steps;
  let above = -1;
  for (const { upTo, minor } of steps) {
    const most = upTo ?? Infinity;
    const range: [number, number] = [above + 1, most];
    found.push(
      shipping.kind === 'byMass'
        ? { cost: minor, value: [least, free - 1], mass: range }
        : {
            cost: minor,
            value: [Math.max(least, range[0]), Math.min(free - 1, most)],
            mass: [0, Infinity],
          },
    );
    above = most;
  }
  return found.filter(({ value, mass }) => value[0] <= value[1] && mass[0] <= mass[1]);
}

const sum = (terms: string[]) => (terms.length > 0 ? terms.join(' + ') : '0 nought');

/**
 * The whole planning problem as a mixed integer model in CPLEX LP format: `x0`, `x1`, ... count
 * multiples of the offers in order, `zS_K` says that supplier S's terms are in region K.
 */
export function packModelLp(request: PackRequest): string {
  const needs = new Map(request.lines.map((line) => [line.id, line.neededMg]));
  const suppliers = new Map(request.suppliers.map((supplier) => [supplier.id, supplier]));
  // Kilograms keep the matrix's figures near each other, which the solver's tolerances need.
  const kg = (mg: number) => String(mg / 1e6);
  const objective: string[] = [];
  const rows: string[] = [];
  const bounds: string[] = [];
  const binaries: string[] = [];
  const tops = request.offers.map((offer) => {
    const supplier = suppliers.get(offer.supplierId) as PackSupplier;
    const most = mostPacks(offer, needs.get(offer.lineId) ?? 0, supplier);
    return Math.floor(most / (offer.multipleOf ?? 1));
  });
  const price = (i: number) => {
    const offer = request.offers[i] as PackOffer;
    return offer.priceMinor * (offer.multipleOf ?? 1);
  };
  const mass = (i: number) => {
    const offer = request.offers[i] as PackOffer;
    return offer.packMg * (offer.multipleOf ?? 1);
  };
  request.offers.forEach((_, i) => {
    objective.push(`${price(i)} x${i}`);
    bounds.push(` 0 <= x${i} <= ${tops[i]}`);
  });
  for (const line of request.lines) {
    const own = request.offers.flatMap((offer, i) => (offer.lineId === line.id ? [i] : []));
    rows.push(` ${sum(own.map((i) => `${kg(mass(i))} x${i}`))} >= ${kg(line.neededMg)}`);
  }
  request.suppliers.forEach((supplier, s) => {
    const own = request.offers.flatMap((offer, i) => (offer.supplierId === supplier.id ? [i] : []));
    if (own.length === 0) return;
    const value = own.map((i) => `${price(i)} x${i}`);
    const masses = own.map((i) => `${kg(mass(i))} x${i}`);
    const allValue = own.reduce((total, i) => total + price(i) * (tops[i] as number), 0);
    const allMass = own.reduce((total, i) => total + mass(i) * (tops[i] as number), 0);
    const names = regions(supplier).map((region, k) => {
      const z = `z${s}_${k}`;
      binaries.push(z);
      objective.push(`${region.cost} ${z}`);
      const [leastValue, mostValue] = region.value;
      const [leastMass, mostMass] = region.mass;
      if (leastValue > 0) rows.push(` ${sum(value)} - ${leastValue} ${z} >= 0`);
      if (leastMass > 0) rows.push(` ${sum(masses)} - ${kg(leastMass)} ${z} >= 0`);
      if (mostValue < allValue) {
        rows.push(` ${sum(value)} + ${allValue - mostValue} ${z} <= ${allValue}`);
      }
      if (mostMass < allMass) {
        rows.push(` ${sum(masses)} + ${kg(allMass - mostMass)} ${z} <= ${kg(allMass)}`);
      }
      return z;
    });
    rows.push(` ${sum(names)} <= 1`);
    own.forEach((i) => {
      const used = names.map((z) => ` - ${tops[i]} ${z}`).join('');
      rows.push(` x${i}${used} <= 0`);
    });
  });
  return [
    'Minimize',
    ` cost: ${sum(objective)}`,
    'Subject To',
    ...rows.map((row, at) => ` r${at}:${row}`),
    'Bounds',
    ...bounds,
    ' nought = 0',
    'General',
    ` ${request.offers.map((_, i) => `x${i}`).join(' ')}`,
    'Binary',
    ` ${binaries.join(' ')}`,
    'End',
    '',
  ].join('\n');
}

/** Packs by offer id from a solved model. */
export function packsOf(request: PackRequest, solved: Solved): Record<string, number> {
  return Object.fromEntries(
    request.offers.flatMap(({ id, multipleOf = 1 }, i) => {
      const count = Math.round(solved.values.get(`x${i}`) ?? 0) * multipleOf;
      return count > 0 ? [[id, count]] : [];
    }),
  );
}
