/** One sentence on standard error, then the end: for trouble that a person has to put right. */
/** @param {string} sentence @returns {never} */
export function giveUp(sentence) {
  process.stderr.write(`${sentence}\n`);
  process.exit(1);
}

/** @param {string} sentence */
export function say(sentence) {
  process.stdout.write(`${sentence}\n`);
}
