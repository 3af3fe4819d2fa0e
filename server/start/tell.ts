/** Something the person at the terminal has to read and act on; shown without a stack. */
export class Told extends Error {
  override readonly name = 'Told';
}

/** One line to the terminal. Standard output, as it is what the start program is for. */
export function say(line = ''): void {
  process.stdout.write(`${line}\n`);
}
