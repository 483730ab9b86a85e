import { loadavg } from 'node:os';
import { run as accuracy } from './accuracy.bench';
import { run as arithmetic } from './arithmetic.bench';
import { run as doubleSine } from './double-sine-precise.bench';
import { run as jobs } from './engine.bench';
import { run as functions, GROWTH_DIGITS, growth } from './functions.bench';
import { measureLie } from './lie.bench';
import { compileArb } from './peers';
import { run as spectra } from './spectrum.bench';
import { run as spheres } from './spheres.bench';
import { type ComparisonRow, mpmathVersion } from './timing';

/**
 * Prints every bench, or those comparisons whose title holds a word given. Comparisons are in processor time, so that other
 * work on the machine counts little; what a person waits for is on the clock.
 */
function main(): void {
  if (process.argv.includes('accuracy')) {
    statedErrors();
    return;
  }
  const missing = compileArb();
  if (missing !== null) process.stdout.write(`Arb is left out: ${missing}\n`);
  const comparisons: readonly (readonly [string, () => readonly ComparisonRow[]])[] = [
    ['Arithmetic', arithmetic],
    ['Double sine, precise tier', doubleSine],
    ['Special functions', functions],
    ['Determinants of spectra', spectra],
  ];
  const [, , word] = process.argv;
  process.stdout.write(`Load ${loadavg()[0]?.toFixed(1)}; Node ${process.version}; mpmath ${mpmathVersion()}\n`);
  for (const [title, run] of comparisons) {
    if (word !== undefined && !title.toLowerCase().includes(word)) continue;
    heading(title);
    table(['', 'digits', 'ours', 'peer', 'peer time', 'ratio', 'our error', 'its error'], run().map(comparisonCells));
  }
  if (word !== undefined && word !== 'digits') return;
  heading('A call by digits, tables warm');
  table(
    ['', ...GROWTH_DIGITS.map(String)],
    growth().map(([name, times]) => [name, ...times.map(microseconds)]),
  );
  if (word !== undefined) return;
  heading('What a keystroke and a slider ask for');
  table(
    ['', 'least, ms', 'median, ms', 'limit', 'limit / least'],
    [...jobs(), ...spheres()].map(({ name, least, median, limit }) => [
      name,
      least.toFixed(2),
      median.toFixed(2),
      `${limit}`,
      `${(limit / least).toFixed(1)}x`,
    ]),
  );
  heading('Dominant characters');
  table(
    ['', 'ours, ms', 'GAP, ms', 'ratio', 'same'],
    measureLie().map(({ name, milliseconds, gapMilliseconds, ratio, equal }) => [
      name,
      milliseconds.toFixed(2),
      gapMilliseconds?.toFixed(1) ?? 'absent',
      ratio === null ? '' : `${ratio.toFixed(0)}x`,
      equal === null ? '' : `${equal}`,
    ]),
  );
}

/** `npm run bench -- accuracy [points] [beginning of a name]`. */
function statedErrors(): void {
  const [points = '20000', only] = process.argv.slice(process.argv.indexOf('accuracy') + 1);
  heading('Largest error over the error stated');
  for (const { name, tier, held, refused, ratio, at } of accuracy(Number(points), only)) {
    const counts = `${held} points${refused > 0 ? `, ${refused} refused` : ''}`;
    process.stdout.write(`  ${name.padEnd(32)} ${tier.padEnd(8)}  ${counts}  ${ratio.toPrecision(3)} at ${at}\n`);
  }
}

function comparisonCells(row: ComparisonRow): string[] {
  const time = row.peerMicroseconds;
  const error = (log10: number | null): string => (log10 === null ? '' : `1e${log10.toFixed(1)}`);
  return [
    row.name,
    `${row.digits}`,
    microseconds(row.microseconds),
    row.peer,
    time === null ? (row.peer === 'none' ? '' : 'absent') : microseconds(time),
    row.ratio === null ? '' : `${row.ratio.toPrecision(3)}x`,
    error(row.log10Error),
    error(row.peerLog10Error),
  ];
}

function microseconds(value: number): string {
  return value < 1000 ? `${value.toPrecision(3)} us` : `${(value / 1000).toPrecision(3)} ms`;
}

function heading(text: string): void {
  process.stdout.write(`\n${text}\n`);
}

function table(header: readonly string[], rows: readonly (readonly string[])[]): void {
  const all = [header, ...rows];
  const widths = header.map((_, k) => Math.max(...all.map((row) => (row[k] ?? '').length)));
  for (const row of all) {
    const cells = row.map((cell, k) => (k === 0 ? cell.padEnd(widths[k] ?? 0) : cell.padStart(widths[k] ?? 0)));
    process.stdout.write(`  ${cells.join('  ').trimEnd()}\n`);
  }
}

main();
