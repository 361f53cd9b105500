import { benchSeason } from './bench-season.ts';

/** Benchmarks by name; each prints ratios, which mean the same on a fast and on a slow machine. */
const benches: Readonly<Record<string, () => Promise<void>>> = { season: benchSeason };

const name = process.argv[2] ?? '';
const bench = benches[name];
if (bench === undefined) {
  process.stderr.write(`Say which: npm run bench -- ${Object.keys(benches).join(' | ')}\n`);
  process.exit(2);
}
await bench();
