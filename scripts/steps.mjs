/** One line a step: what, how it went, how long since the start. Plain text, the same with and without a terminal. */

/** Ends the command with one sentence for its reader; `output` is what the program at fault said. */
export class StepFailure extends Error {
  constructor(message, output = '') {
    super(message);
    this.output = output;
  }
}

const began = performance.now();
const nameWidth = 14;
const resultWidth = 58;
let open = Promise.resolve();
let interrupted = false;

/** `work` answers the words for the line, or an object whose `said` are the words. */
export function step(name, work) {
  const attempt = attemptStep(name, work);
  open = attempt.catch(() => {});
  return attempt;
}

async function attemptStep(name, work) {
  process.stdout.write(`  ${name.padEnd(nameWidth)}`);
  try {
    const result = await work();
    if (!interrupted) endLine(typeof result === 'string' ? result : (result?.said ?? 'done'));
    return result;
  } catch (error) {
    if (!interrupted) endLine('failed');
    throw error;
  }
}

/** Leaves the line that is being written; resolves when its work has come to some end. */
export async function interruptStep() {
  interrupted = true;
  process.stdout.write('\n');
  await open;
  interrupted = false;
}

function endLine(words) {
  process.stdout.write(`${words.padEnd(resultWidth)} ${elapsed()}\n`);
}

export function elapsed() {
  return `${((performance.now() - began) / 1000).toFixed(1)} s`.padStart(8);
}

/** What went wrong, with the end of what the program said before the sentence that people need. */
export function reportFailure(error) {
  const output = typeof error.output === 'string' ? error.output.trim().split('\n').slice(-40).join('\n') : '';
  if (output) console.error(`\n${output}`);
  // Only a sentence that was meant for people stands without its trace.
  console.error(`\n${'output' in error ? error.message : error.stack}`);
}
