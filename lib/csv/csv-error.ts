/** What is wrong with the form of a file, by line. It never repeats what the file says. */
export class CsvError extends Error {
  override readonly name = 'CsvError';
  constructor(
    readonly code: 'unclosed-quote' | 'field-too-long' | 'too-many-fields' | 'text-after-quote' | 'not-text',
    readonly line: number,
    message: string,
  ) {
    super(message);
  }
}
