/**
 * Entry of the command line: hands the process's arguments and streams to run().
 */
import { readFileSync } from 'node:fs';
import { run } from './run';

process.stdout.on('error', (error: NodeJS.ErrnoException) => {
  // The reader, `head` say, has had enough.
  if (error.code === 'EPIPE') process.exit(0);
  throw error;
});

process.exitCode = run(process.argv.slice(2), {
  write: (text) => void process.stdout.write(text),
  writeError: (text) => void process.stderr.write(text),
  // File descriptor 0 is standard input.
  read: (file) => readFileSync(file === '-' ? 0 : file, 'utf8'),
});
