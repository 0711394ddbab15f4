/** A cell of the grid, counted from 0. */
export interface Place {
  readonly sheet: string;
  readonly row: number;
  readonly column: number;
}

/** The messages that stand behind the error values in the grid. */
export class FaultNotes {
  readonly #notes = new Map<string, string>();

  set(place: Place, message: string): void {
    this.#notes.set(key(place), message);
  }

  clear(place: Place): void {
    this.#notes.delete(key(place));
  }

  at(place: Place): string | null {
    return this.#notes.get(key(place)) ?? null;
  }
}

const key = ({ sheet, row, column }: Place): string => `${sheet} ${row} ${column}`;
