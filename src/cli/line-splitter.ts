/**
 * Cuts a stream of text into lines in constant memory: of a line longer than `longest` only that much plus one unit is
 * kept, enough for the reader to see that it is too long. Line ends are LF, CRLF or CR.
 */
export class LineSplitter {
  readonly #longest: number;
  #rest = '';
  #afterReturn = false;
  #open = false;

  constructor(longest: number) {
    this.#longest = longest;
  }

  /** The lines that this piece of text completes. */
  *push(text: string): Generator<string> {
    let from = 0;
    for (let at = 0; at < text.length; at += 1) {
      const unit = text[at];
      if (unit === '\n' && this.#afterReturn) {
        this.#afterReturn = false;
        from = at + 1;
        continue;
      }
      this.#afterReturn = unit === '\r';
      if (unit !== '\n' && unit !== '\r') continue;
      this.#keep(text.slice(from, at));
      yield this.#take();
      from = at + 1;
    }
    if (from < text.length) {
      this.#keep(text.slice(from));
      this.#open = true;
    }
  }

  /** The last line, where the stream does not end with a line end. */
  *end(): Generator<string> {
    if (this.#open) yield this.#take();
  }

  #keep(piece: string): void {
    const room = this.#longest + 1 - this.#rest.length;
    if (room > 0) this.#rest += piece.slice(0, room);
  }

  #take(): string {
    const line = this.#rest;
    this.#rest = '';
    this.#open = false;
    return line;
  }
}
