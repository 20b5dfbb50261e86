/** A program of the graphics processor, and the places of its uniforms. */
export interface Program {
  program: WebGLProgram
  /** Place of a uniform; null where the compiler found no use for it. */
  at: (name: string) => WebGLUniformLocation | null
}

/**
 * Compiles a program.
 *
 * @throws {Error} with the compiler's own words when it refuses
 */
export function makeProgram(gl: WebGL2RenderingContext, vertex: string, fragment: string): Program {
  const program = gl.createProgram()
  const shaders = [shaderOf(gl, gl.VERTEX_SHADER, vertex), shaderOf(gl, gl.FRAGMENT_SHADER, fragment)]
  for (const shader of shaders) gl.attachShader(program, shader)
  gl.linkProgram(program)
  if (!gl.getProgramParameter(program, gl.LINK_STATUS)) {
    const words = [gl.getProgramInfoLog(program), ...shaders.map(shader => gl.getShaderInfoLog(shader))]
    throw new Error(`the graphics processor refused the picture's program: ${words.filter(Boolean).join(' ')}`)
  }
  for (const shader of shaders) gl.deleteShader(shader)
  const places = new Map<string, WebGLUniformLocation | null>()
  return {
    program,
    at(name) {
      const found = places.get(name)
      if (found !== undefined) return found
      const place = gl.getUniformLocation(program, name)
      places.set(name, place)
      return place
    },
  }
}

function shaderOf(gl: WebGL2RenderingContext, type: GLenum, source: string): WebGLShader {
  const shader = gl.createShader(type)
  if (!shader) throw new Error('the graphics processor is gone')
  gl.shaderSource(shader, source)
  gl.compileShader(shader)
  return shader
}
