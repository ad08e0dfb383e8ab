import type { Theme } from '#shared/look/theme.ts'
import type { BoardMesh } from './board-mesh.ts'
import { boardPalette } from './board-palette.ts'
import { SHADER_PART, VERTEX_SHADER, fragmentShader } from './board-shader.ts'
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
  readonly running: boolean
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

function link(gl: WebGL2RenderingContext, parts: number): WebGLProgram {
  const program = gl.createProgram()
  const vertex = compile(gl, gl.VERTEX_SHADER, VERTEX_SHADER)
  const fragment = compile(gl, gl.FRAGMENT_SHADER, fragmentShader(parts))
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

/** CSS pixels of a cell's sides in the middle of the sheet; they differ across a site by less than a thousandth. */
function cellPixels(matrix: Float32Array, { columnStep, rowStep }: BoardMesh, frame: BoardFrame): [number, number] {
  const length = ({ x, y }: { x: number; y: number }): number => {
    const across = (matrix[0]! * x + matrix[4]! * y) * frame.width
    const down = (matrix[1]! * x + matrix[5]! * y) * frame.height
    return Math.hypot(across, down) / (2 * matrix[15]! * frame.pixelRatio)
  }
  return [length(columnStep), length(rowStep)]
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

interface BoardProgram {
  readonly program: WebGLProgram
  readonly at: (name: string) => WebGLUniformLocation | null
  /** uploads the palette when the program has another one */
  readonly setTheme: (theme: Theme) => void
}

function createProgram(gl: WebGL2RenderingContext, parts: number): BoardProgram {
  const program = link(gl, parts)
  const places = new Map<string, WebGLUniformLocation | null>()
  const at = (name: string): WebGLUniformLocation | null => {
    if (!places.has(name)) places.set(name, gl.getUniformLocation(program, name))
    return places.get(name) ?? null
  }
  let drawn: Theme | undefined
  const setTheme = (theme: Theme): void => {
    if (theme === drawn) return
    const palette = boardPalette(theme)
    for (const name of ['fill', 'lines', 'cross', 'line'] as const) gl.uniform4fv(at(`u_${name}`), palette[name])
    for (const name of ['mark', 'near', 'ink', 'sheetInk', 'preview'] as const) gl.uniform3fv(at(`u_${name}`), palette[name])
    gl.uniform2fv(at('u_shift'), palette.shift)
    gl.uniform1fv(at('u_lineWidth'), palette.lineWidth)
    drawn = theme
  }
  return { program, at, setTheme }
}

function createCellTexture(gl: WebGL2RenderingContext, texture: BoardTexture): WebGLTexture {
  const cells = gl.createTexture()
  gl.bindTexture(gl.TEXTURE_2D, cells)
  gl.texStorage2D(gl.TEXTURE_2D, 1, gl.RGBA8UI, texture.columns, texture.rows)
  for (const filter of [gl.TEXTURE_MIN_FILTER, gl.TEXTURE_MAG_FILTER]) gl.texParameteri(gl.TEXTURE_2D, filter, gl.NEAREST)
  for (const wrap of [gl.TEXTURE_WRAP_S, gl.TEXTURE_WRAP_T]) gl.texParameteri(gl.TEXTURE_2D, wrap, gl.CLAMP_TO_EDGE)
  upload(gl, texture, { column: 0, row: 0, columns: texture.columns, rows: texture.rows })
  return cells
}

/** The parts of the shader that the sheet asks for now. A change brings the marks, which may be what it takes away. */
function neededParts(texture: BoardTexture, running: boolean): number {
  const { marks, regions } = texture.counts()
  return (marks > 0 || running ? SHADER_PART.marks : 0) | (running ? SHADER_PART.change : 0) | (regions > 0 ? SHADER_PART.regions : 0)
}

const ramp = (from: number, to: number, value: number): number => Math.min(1, Math.max(0, (value - from) / (to - from)))

/** Programs, mesh and texture on one graphics context. */
export function createBoardGpu(gl: WebGL2RenderingContext, mesh: BoardMesh, texture: BoardTexture): BoardGpu {
  const programs = new Map<number, BoardProgram>()
  const programOf = (parts: number): BoardProgram => {
    const made = programs.get(parts) ?? createProgram(gl, parts)
    programs.set(parts, made)
    return made
  }
  programOf(0)
  const bindVertices = createVertexArray(gl, mesh)
  const cells = createCellTexture(gl, texture)

  return {
    draw(frame) {
      const matrix = shiftMatrix(frame.matrix, mesh.centre.x, mesh.centre.y)
      const [across, down] = cellPixels(matrix, mesh, frame)
      const { program, at, setTheme } = programOf(neededParts(texture, frame.running))
      gl.useProgram(program)
      gl.activeTexture(gl.TEXTURE0)
      gl.bindTexture(gl.TEXTURE_2D, cells)
      const dirty = texture.takeDirty()
      if (dirty !== undefined) upload(gl, texture, dirty)
      setTheme(frame.theme)
      gl.uniformMatrix4fv(at('u_matrix'), false, matrix)
      gl.uniform1i(at('u_cells'), 0)
      gl.uniform2i(at('u_size'), texture.columns, texture.rows)
      gl.uniform2f(at('u_cellPx'), across, down)
      gl.uniform1f(at('u_ratio'), frame.pixelRatio)
      // lines between small cells would be all there is to see
      gl.uniform2f(at('u_fade'), ramp(3, 9, Math.min(across, down)), ramp(9, 15, Math.min(across, down)))
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
      for (const { program } of programs.values()) gl.deleteProgram(program)
      gl.deleteTexture(cells)
    },
  }
}
