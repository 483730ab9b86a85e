import { readFileSync, writeFileSync } from 'node:fs';
import { analyse } from '../engine/requests/analysis';
import { report } from '../engine/requests/report';

const USAGE = 'Usage: npm run --silent batch -- FILE.lathe [--digits N] [--out FILE.json]\n';
/** Digits of a value that does not say how many it wants. */
const DIGITS = 30;

interface Options {
  readonly file: string;
  readonly digits: number;
  readonly out: string | null;
}

/** Reads the command line; a string says what is wrong with it. */
function readOptions(words: readonly string[]): Options | string {
  let file: string | null = null;
  let digits = DIGITS;
  let out: string | null = null;
  for (let k = 0; k < words.length; k++) {
    const word = words[k] as string;
    if (word === '--digits' || word === '--out') {
      const value = words[++k];
      if (value === undefined) return `${word} needs a value.`;
      if (word === '--out') out = value;
      else if (/^[1-9]\d{0,3}$/.test(value)) digits = Number(value);
      else return `--digits takes a whole number from 1 to 9999, not ${value}.`;
    } else if (word.startsWith('--')) return `${word} is no option.`;
    else if (file === null) file = word;
    else return `One notebook at a time; ${word} is a second one.`;
  }
  return file === null ? 'No notebook was named.' : { file, digits, out };
}

/** Where the command writes: the report, and everything else. */
export interface Streams {
  readonly out: (text: string) => void;
  readonly error: (text: string) => void;
}

/**
 * The batch command with the words of its command line. Answers the exit code: 0 every request answered, 1 a request
 * failed, 2 the notebook or the command line has errors.
 */
export function batchCommand(words: readonly string[], streams: Streams): number {
  const options = readOptions(words);
  if (typeof options === 'string') {
    streams.error(`${options}\n${USAGE}`);
    return 2;
  }
  let text: string;
  try {
    text = readFileSync(options.file, 'utf8');
  } catch (error) {
    streams.error(`${options.file} cannot be read: ${error instanceof Error ? error.message : String(error)}\n`);
    return 2;
  }
  const { output, failed } = report(analyse(text), {
    now: () => performance.now() / 1000,
    progress: ({ done, of, says }) => {
      streams.error(`${done + 1} of ${of}: ${says}\n`);
      return true;
    },
    digits: options.digits,
  });
  const json = `${JSON.stringify(output, null, 2)}\n`;
  if (options.out === null) streams.out(json);
  else {
    try {
      writeFileSync(options.out, json);
    } catch (error) {
      streams.error(`${options.out} cannot be written: ${error instanceof Error ? error.message : String(error)}\n`);
      return 2;
    }
  }
  if (output.problems.some(({ severity }) => severity === 'error')) return 2;
  return failed ? 1 : 0;
}
