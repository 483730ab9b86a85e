process.stderr.write('The batch command is not written yet.\n');
process.exitCode = 2;
