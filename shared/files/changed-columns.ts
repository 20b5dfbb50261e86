import { PAINT_COLUMNS, paintCell, type PaintLine } from './paint-columns'

/** The columns in which two states of a paint read differently. */
export function changedColumns(from: PaintLine, to: PaintLine): string[] {
  return PAINT_COLUMNS.filter(column => column.name !== 'id' && paintCell(from, column, ',') !== paintCell(to, column, ',')).map(column => column.name)
}
