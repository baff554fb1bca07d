/** Longer than any number of grams, and short enough to be looked at closely. */
const CELL_AT_MOST = 40

/**
 * Grams as a table's cell has them: `500`, `1e3`, `0.5`, `500 g`, `1.5 kg`; with `decimalComma` (the cells are parted by
 * another sign) also `12,5`. What may be either thousands or decimals (`1,500`) is null, not guessed. No range is
 * checked here.
 *
 * @example readGramsCell('1,5 kg', true) // 1500
 */
export function readGramsCell(cell: string, decimalComma: boolean): number | null {
  if (cell.length > CELL_AT_MOST) return null
  const [, figure = '', unit = 'g'] = /^(.*?)\s*(g|gr|grams?|kg)?$/i.exec(cell) ?? []
  if (decimalComma && /^[1-9]\d{0,2}[.,]\d{3}$/.test(figure)) return null
  const number = decimalComma ? figure.replace(',', '.') : figure
  if (!/^(\d+\.?\d*|\.\d+)(e[-+]?\d+)?$/i.test(number)) return null
  return Number(number) * (unit.toLowerCase() === 'kg' ? 1000 : 1)
}
