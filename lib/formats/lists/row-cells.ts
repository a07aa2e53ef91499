import type { ListMapping } from "@/lib/schemas/import-list";
import { DomainError } from "@/lib/si/errors";
import { parseQuantity, toSi, type Quantity } from "@/lib/si/units";
import type { TableRow } from "../delimited/table";
import type { LengthRule, ListField, RowCells, RowProblem } from "./list-field";

/** What a spreadsheet holds in a cell; nothing on a board is longer. */
export const MAX_CELL_CHARACTERS = 32_767;
const SHOWN_CHARACTERS = 60;
/** 10 m, which no board reaches. */
const MAX_LENGTH_M = 10;

/** Reads the cells of one row under a mapping and collects what is wrong with them. */
export class MappedRow implements RowCells {
  readonly problems: RowProblem[] = [];

  constructor(
    private readonly source: TableRow,
    private readonly mapping: ListMapping,
    private readonly fields: ReadonlyMap<string, ListField>,
  ) {}

  text(field: string, max: number): string {
    const raw = this.raw(field);
    if (raw === null) return "";
    const plain = raw.normalize("NFC").replace(/\s+/gu, " ");
    if (plain === "") this.refuseEmpty(field);
    if (/\p{Cc}/u.test(plain)) this.refuse(field, "holds control characters. Remove them.");
    else if (plain.length > max)
      this.refuse(field, `has ${plain.length} characters; at most ${max} are kept. Shorten it.`);
    return plain;
  }

  /** A pin (REFERENCE.PIN), a via or a junction. */
  node(field: string): string {
    return this.text(field, 80);
  }

  length(field: string, rule: LengthRule): Quantity | null {
    const raw = this.raw(field);
    if (raw === null) return null;
    if (raw === "") {
      this.refuseEmpty(field);
      return null;
    }
    const unit = this.mapping.fields[field]?.unit ?? null;
    const doubt = this.doubtOf(raw);
    if (doubt) {
      this.refuse(field, doubt);
      return null;
    }
    try {
      const quantity = parseQuantity(this.withPoint(raw), "length", unit ?? "mm");
      if (unit === null && /^[\d.,+\-\s]*$/.test(raw)) {
        this.refuse(field, `'${raw}' has no unit. Choose the unit of this column, or write ${raw} mm.`);
        return null;
      }
      const si = toSi(quantity, "length");
      const said = `${quantity.value} ${quantity.unit}`;
      if (rule === "positive" && !(si > 0)) this.refuse(field, `${said} must be above zero.`);
      else if (rule === "not negative" && si < 0) this.refuse(field, `${said} must not be negative.`);
      else if (Math.abs(si) > MAX_LENGTH_M)
        this.refuse(field, `${said} is longer than 10 m, which no board reaches. Check the unit.`);
      return quantity;
    } catch (error) {
      if (!(error instanceof DomainError)) throw error;
      this.refuse(field, error.message);
      return null;
    }
  }

  count(field: string, max: number): number | null {
    const raw = this.raw(field);
    if (raw === null || raw === "") {
      if (raw === "") this.refuseEmpty(field);
      return null;
    }
    // Spreadsheets write whole numbers as 2.0 or 2,00.
    const match = /^\+?(\d{1,9})(?:[.,](?:0{1,2}|0{4,}))?$/.exec(raw);
    const value = match ? Number(match[1]) : Number.NaN;
    if (!match || value > max) {
      this.refuse(field, `'${shown(raw)}' is not a whole number from 0 to ${max}.`);
      return null;
    }
    return value;
  }

  /** Names separated by space, `;`, `|` or `,`. */
  words(field: string, max: number): string[] {
    const raw = this.raw(field);
    if (raw === null) return [];
    if (raw === "") this.refuseEmpty(field);
    const found = [...new Set(raw.split(/[\s;|,]+/u).filter(Boolean))];
    if (found.length > max) this.refuse(field, `names ${found.length} things; at most ${max} are kept.`);
    const long = found.find((word) => word.length > 80);
    if (long) this.refuse(field, `'${shown(long)}' is longer than 80 characters.`);
    return found;
  }

  refuse(field: string, reason: string): void {
    const column = this.mapping.fields[field]?.column;
    const value = column === null || column === undefined ? "" : (this.source.cells[column] ?? "");
    this.problems.push({
      row: this.source.row,
      column: this.fields.get(field)?.label.toLowerCase() ?? field,
      value: shown(value),
      reason,
    });
  }

  /** The cell's text; null where no column is mapped or the cell is too long to be looked at. */
  private raw(field: string): string | null {
    const column = this.mapping.fields[field]?.column;
    if (column === null || column === undefined) {
      this.refuseEmpty(field);
      return null;
    }
    const cell = this.source.cells[column] ?? "";
    if (cell.length > MAX_CELL_CHARACTERS) {
      this.refuse(
        field,
        `has ${cell.length.toLocaleString("en")} characters; a cell holds at most ${MAX_CELL_CHARACTERS.toLocaleString("en")}. Look for a quote that is not closed.`,
      );
      return null;
    }
    return cell;
  }

  private refuseEmpty(field: string): void {
    const known = this.fields.get(field);
    if (known?.required) this.refuse(field, `is empty. Every row needs a ${known.label.toLowerCase()}.`);
  }

  /** "1,270" is a number of one reading once the whole list is known to use the decimal comma. */
  private withPoint(raw: string): string {
    if (!this.mapping.decimalComma) return raw;
    return raw.replace(/^([+-]?\d*),(\d+)(?![\d.,])/, "$1.$2");
  }

  /** Why a number cannot be read beside the list's way of writing decimals; null where it can. */
  private doubtOf(raw: string): string | null {
    const number = /^[+\-\u2212\u2013]?([\d.,]+)/u.exec(raw)?.[1] ?? "";
    const { decimalComma } = this.mapping;
    const grouped = decimalComma ? /^[1-9]\d{0,2}(?:\.\d{3})+$/ : /^[1-9]\d{0,2}(?:,\d{3})+$/;
    const otherWay = decimalComma ? /,.*\./ : /\..*,/;
    if (!grouped.test(number) && !otherWay.test(number)) return null;
    return decimalComma
      ? `'${shown(raw)}' can be read two ways in a list with a decimal comma. Leave out the point, or untick "Decimal comma".`
      : `'${shown(raw)}' can be read two ways. Leave out the comma, or tick "Decimal comma" if it stands for the point.`;
  }
}

function shown(value: string): string {
  const plain = value.replace(/\p{Cc}/gu, " ");
  return plain.length > SHOWN_CHARACTERS ? `${plain.slice(0, SHOWN_CHARACTERS)}…` : plain;
}
