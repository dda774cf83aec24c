import { runCompute } from './run-compute';

process.stdout.on('error', (error: NodeJS.ErrnoException) => {
  // Whoever reads us has seen enough (| head).
  if (error.code === 'EPIPE') process.exit(0);
  throw error;
});

void runCompute(process.argv.slice(2), process).then((code) => {
  process.exitCode = code;
});
