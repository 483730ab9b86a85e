import { run as accuracy } from './accuracy.bench';
import { run as arithmetic } from './arithmetic.bench';
import { run as doubleSine } from './double-sine-precise.bench';
import { run as jobs } from './engine.bench';
import { run as functions } from './functions.bench';
import { measureLie } from './lie.bench';
import { run as spectra } from './spectrum.bench';
import { run as spheres } from './spheres.bench';
import type { ComparisonRow } from './timing';

/**
 * Prints every bench. Comparisons are in processor time, so that other work on the machine does not count; what a person
 * waits for is on the clock.
 */
function main(): void {
  if (process.argv.includes('accuracy')) {
    statedErrors();
    return;
  }
  const comparisons: readonly (readonly [string, () => readonly ComparisonRow[]])[] = [
    ['Arithmetic', arithmetic],
    ['Double sine, precise tier', doubleSine],
    ['Special functions', functions],
    ['Determinants of spectra', spectra],
  ];
  for (const [title, run] of comparisons) {
    heading(title);
    table(['', 'digits', 'ours', 'peer', 'peer time', 'ratio', 'our error', 'its error'], run().map(comparisonCells));
  }
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

/** `npm run bench -- accuracy [points]`. */
function statedErrors(): void {
  const points = Number(process.argv[process.argv.indexOf('accuracy') + 1] ?? '20000');
  heading('Largest error over the error stated');
  for (const { name, bits, held, refused, ratio, at } of accuracy(points)) {
    const counts = `${held} points${refused > 0 ? `, ${refused} refused` : ''}`;
    process.stdout.write(`  ${name.padEnd(20)} ${bits} bits  ${counts}  ${ratio.toPrecision(3)} at ${at}\n`);
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
    time === null ? 'absent' : `${microseconds(time)}${row.peerTime === 'recorded' ? ' (recorded)' : ''}`,
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
