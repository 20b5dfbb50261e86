/** A QR code as one path of unit squares, with its quiet zone: side in squares, and the path. */
export interface CodeSquare { side: number, path: string }

/** Squares of quiet round a QR code. @source ISO/IEC 18004: four modules */
const QUIET = 4

/** The QR code of what stands on a bottle; what makes it is brought when it is wanted. */
export async function codeSquare(code: string): Promise<CodeSquare> {
  const { default: qrcode } = await import('qrcode')
  const { modules } = qrcode.create(code, { errorCorrectionLevel: 'M' })
  const path: string[] = []
  for (let row = 0; row < modules.size; row++) {
    for (let column = 0; column < modules.size; column++) {
      if (modules.get(row, column)) path.push(`M${column + QUIET} ${row + QUIET}h1v1h-1z`)
    }
  }
  return { side: modules.size + 2 * QUIET, path: path.join('') }
}
