import type { Theme } from '#shared/look/theme.ts'
import type { BoardMesh } from './board-mesh.ts'
import { FRAGMENT_SHADER, VERTEX_SHADER, boardPalette } from './board-shader.ts'
import type { BoardTexture, TexelBox } from './board-texture.ts'

/** What changes from frame to frame. */
export interface BoardFrame {
  /** from Mercator 0..1 to clip space, in double precision, by columns */
  readonly matrix: ArrayLike<number>
  /** device pixels */
  readonly width: number
  readonly height: number
  readonly pixelRatio: number
  readonly theme: Theme
  /** for each slot: column, row and reach of the ink's front, and 1 while it runs */
  readonly fronts: Float32Array
}

export interface BoardGpu {
  readonly draw: (frame: BoardFrame) => void
  readonly dispose: () => void
}

function compile(gl: WebGL2RenderingContext, kind: number, source: string): WebGLShader {
  const shader = gl.createShader(kind)
  if (shader === null) throw new Error('The drawing of the Ground needs WebGL 2')
  gl.shaderSource(shader, source)
  gl.compileShader(shader)
  return shader
}

function link(gl: WebGL2RenderingContext): WebGLProgram {
  const program = gl.createProgram()
  const vertex = compile(gl, gl.VERTEX_SHADER, VERTEX_SHADER)
  const fragment = compile(gl, gl.FRAGMENT_SHADER, FRAGMENT_SHADER)
  gl.attachShader(program, vertex)
  gl.attachShader(program, fragment)
  gl.linkProgram(program)
  if (!gl.getProgramParameter(program, gl.LINK_STATUS) && !gl.isContextLost()) {
    throw new Error(`The Ground's shader does not link: ${gl.getShaderInfoLog(fragment) ?? gl.getProgramInfoLog(program)}`)
  }
  gl.deleteShader(vertex)
  gl.deleteShader(fragment)
  return program
}

/**
 * The matrix with the centre folded in, before anything is rounded to single precision: at street zoom a
 * Mercator coordinate has no digits left for centimetres.
 */
export function shiftMatrix(matrix: ArrayLike<number>, x: number, y: number): Float32Array {
  const shifted = Array.from(matrix)
  for (let row = 0; row < 4; row++) shifted[12 + row] = matrix[row]! * x + matrix[4 + row]! * y + matrix[12 + row]!
  return new Float32Array(shifted)
}

function createVertexArray(gl: WebGL2RenderingContext, mesh: BoardMesh): () => void {
  const array = gl.createVertexArray()
  const vertices = gl.createBuffer()
  const indices = gl.createBuffer()
  gl.bindVertexArray(array)
  gl.bindBuffer(gl.ARRAY_BUFFER, vertices)
  gl.bufferData(gl.ARRAY_BUFFER, mesh.vertices, gl.STATIC_DRAW)
  gl.enableVertexAttribArray(0)
  gl.vertexAttribPointer(0, 2, gl.FLOAT, false, 16, 0)
  gl.enableVertexAttribArray(1)
  gl.vertexAttribPointer(1, 2, gl.FLOAT, false, 16, 8)
  gl.bindBuffer(gl.ELEMENT_ARRAY_BUFFER, indices)
  gl.bufferData(gl.ELEMENT_ARRAY_BUFFER, mesh.indices, gl.STATIC_DRAW)
  gl.bindVertexArray(null)
  gl.bindBuffer(gl.ARRAY_BUFFER, null)
  return () => gl.bindVertexArray(array)
}

function upload(gl: WebGL2RenderingContext, texture: BoardTexture, box: TexelBox): void {
  // the map leaves these as its own last upload wanted them
  gl.pixelStorei(gl.UNPACK_ALIGNMENT, 1)
  gl.pixelStorei(gl.UNPACK_FLIP_Y_WEBGL, false)
  gl.pixelStorei(gl.UNPACK_PREMULTIPLY_ALPHA_WEBGL, false)
  gl.pixelStorei(gl.UNPACK_ROW_LENGTH, texture.columns)
  gl.pixelStorei(gl.UNPACK_SKIP_PIXELS, box.column)
  gl.pixelStorei(gl.UNPACK_SKIP_ROWS, box.row)
  gl.texSubImage2D(gl.TEXTURE_2D, 0, box.column, box.row, box.columns, box.rows, gl.RGBA_INTEGER, gl.UNSIGNED_BYTE, texture.bytes)
  gl.pixelStorei(gl.UNPACK_ROW_LENGTH, 0)
  gl.pixelStorei(gl.UNPACK_SKIP_PIXELS, 0)
  gl.pixelStorei(gl.UNPACK_SKIP_ROWS, 0)
}

/** Program, mesh and texture on one graphics context. */
export function createBoardGpu(gl: WebGL2RenderingContext, mesh: BoardMesh, texture: BoardTexture): BoardGpu {
  const program = link(gl)
  const bindVertices = createVertexArray(gl, mesh)
  const cells = gl.createTexture()
  gl.bindTexture(gl.TEXTURE_2D, cells)
  gl.texStorage2D(gl.TEXTURE_2D, 1, gl.RGBA8UI, texture.columns, texture.rows)
  for (const filter of [gl.TEXTURE_MIN_FILTER, gl.TEXTURE_MAG_FILTER]) gl.texParameteri(gl.TEXTURE_2D, filter, gl.NEAREST)
  for (const wrap of [gl.TEXTURE_WRAP_S, gl.TEXTURE_WRAP_T]) gl.texParameteri(gl.TEXTURE_2D, wrap, gl.CLAMP_TO_EDGE)
  upload(gl, texture, { column: 0, row: 0, columns: texture.columns, rows: texture.rows })
  const places = new Map<string, WebGLUniformLocation | null>()
  const at = (name: string): WebGLUniformLocation | null => {
    if (!places.has(name)) places.set(name, gl.getUniformLocation(program, name))
    return places.get(name) ?? null
  }
  let drawnTheme: Theme | undefined

  const setTheme = (theme: Theme): void => {
    if (theme === drawnTheme) return
    const palette = boardPalette(theme)
    gl.uniform3fv(at('u_fill'), palette.fill)
    gl.uniform3fv(at('u_mark'), palette.mark)
    gl.uniform3fv(at('u_near'), palette.near)
    gl.uniform4fv(at('u_line'), palette.line)
    gl.uniform1fv(at('u_lineWidth'), palette.lineWidth)
    gl.uniform3fv(at('u_ink'), palette.ink)
    gl.uniform3fv(at('u_sheetInk'), palette.sheetInk)
    gl.uniform3fv(at('u_preview'), palette.preview)
    drawnTheme = theme
  }

  return {
    draw(frame) {
      const matrix = shiftMatrix(frame.matrix, mesh.centre.x, mesh.centre.y)
      gl.useProgram(program)
      gl.activeTexture(gl.TEXTURE0)
      gl.bindTexture(gl.TEXTURE_2D, cells)
      const dirty = texture.takeDirty()
      if (dirty !== undefined) upload(gl, texture, dirty)
      setTheme(frame.theme)
      gl.uniformMatrix4fv(at('u_matrix'), false, matrix)
      gl.uniform1i(at('u_cells'), 0)
      gl.uniform2i(at('u_size'), texture.columns, texture.rows)
      gl.uniform1f(at('u_ratio'), frame.pixelRatio)
      // on whole device pixels, so that hatch lines stay crisp while the map glides
      gl.uniform2f(
        at('u_anchor'),
        Math.round((matrix[12]! / matrix[15]! + 1) * 0.5 * frame.width),
        Math.round((matrix[13]! / matrix[15]! + 1) * 0.5 * frame.height),
      )
      gl.uniform4fv(at('u_front'), frame.fronts)
      gl.disable(gl.DEPTH_TEST)
      gl.disable(gl.STENCIL_TEST)
      gl.disable(gl.CULL_FACE)
      gl.enable(gl.BLEND)
      gl.blendFunc(gl.ONE, gl.ONE_MINUS_SRC_ALPHA)
      bindVertices()
      gl.drawElements(gl.TRIANGLES, mesh.indices.length, gl.UNSIGNED_SHORT, 0)
      gl.bindVertexArray(null)
    },
    dispose() {
      gl.deleteProgram(program)
      gl.deleteTexture(cells)
    },
  }
}
