import { batchCommand } from './batch-command';

process.exitCode = batchCommand(process.argv.slice(2), {
  out: (text) => process.stdout.write(text),
  error: (text) => process.stderr.write(text),
});
