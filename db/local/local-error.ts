/** Something on this machine stands in the way. The message is for the person at the terminal: no stack is shown. */
export class LocalError extends Error {
  override readonly name = 'LocalError';
}
