import { CsvError } from './csv-error';

const BOM = '\ufeff';

/**
 * Bytes to text, piece by piece: UTF-8 with or without its mark, UTF-16 by its mark, and Windows-1252 for files that are
 * neither (spreadsheets still write it). Which of them is decided on the first piece by `startsAsUtf8`.
 */
export class TextPieces {
  private decoder: TextDecoder | undefined;
  private begun = false;

  push(bytes: Uint8Array): string {
    this.decoder ??= decoderFor(bytes);
    return this.clean(this.decoder.decode(bytes, { stream: true }));
  }

  end(): string {
    return this.decoder ? this.clean(this.decoder.decode()) : '';
  }

  private clean(text: string): string {
    if (text.includes('\0')) throw new CsvError('not-text', 1, 'This is not a text file: it holds zero bytes. Allowed: CSV, or a FHIR bundle as JSON.');
    if (this.begun || text === '') return text;
    this.begun = true;
    return text.startsWith(BOM) ? text.slice(1) : text;
  }
}

function decoderFor(first: Uint8Array): TextDecoder {
  if (first[0] === 0xff && first[1] === 0xfe) return new TextDecoder('utf-16le');
  if (first[0] === 0xfe && first[1] === 0xff) return new TextDecoder('utf-16be');
  return new TextDecoder(startsAsUtf8(first) ? 'utf-8' : 'windows-1252');
}

/** A piece may end inside a character, so up to three last bytes are let go before it is judged. */
function startsAsUtf8(bytes: Uint8Array): boolean {
  for (let cut = 0; cut <= Math.min(3, bytes.length); cut += 1) {
    try {
      new TextDecoder('utf-8', { fatal: true }).decode(bytes.subarray(0, bytes.length - cut));
      return true;
    } catch {
      continue;
    }
  }
  return false;
}
