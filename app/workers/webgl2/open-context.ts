/** A canvas of a page or of a thread; nothing is ever shown on it. */
export type EngineCanvas = OffscreenCanvas | HTMLCanvasElement

/** A WebGL 2 context that can draw into 32-bit numbers and hand them back; undefined where there is none. */
export function openContext(canvas: EngineCanvas): WebGL2RenderingContext | undefined {
  // Both kinds of canvas have it, but their lists of overloads do not go together.
  const gl = canvas.getContext('webgl2', { alpha: false, antialias: false, depth: false, stencil: false, powerPreference: 'high-performance' }) as WebGL2RenderingContext | null
  if (!gl?.getExtension('EXT_color_buffer_float')) return undefined
  return hasFinePrecision(gl) ? gl : undefined
}

/** Sixteen bands of a stack need all of a 32-bit number. */
function hasFinePrecision(gl: WebGL2RenderingContext): boolean {
  return (gl.getShaderPrecisionFormat(gl.FRAGMENT_SHADER, gl.HIGH_FLOAT)?.precision ?? 0) >= 23
}

/** What the graphics processor calls itself, as far as it is told. */
export function rendererOf(gl: WebGL2RenderingContext): string {
  const told = gl.getExtension('WEBGL_debug_renderer_info')
  return String(gl.getParameter(told ? told.UNMASKED_RENDERER_WEBGL : gl.RENDERER))
}

/** Whether a renderer of this name is a program on the processor and no graphics processor at all. */
export function isSoftware(renderer: string): boolean {
  return /swiftshader|llvmpipe|softpipe|software|basic render/i.test(renderer)
}
