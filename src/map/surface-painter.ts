/**
 * Paints the bands of a surface over its triangles with a small program of the graphics processor. Each point is painted once,
 * and a slider changes only the figures of the corners; as polygons every band would be cut, sent, tiled and painted over the one
 * below it at each move of a slider.
 */
import type { CustomLayerInterface, Map as MapLibreMap } from 'maplibre-gl';
import { rampColour } from '../charts/ramp.ts';
import { opaque } from './paint-pixels.ts';
import { cornerFigures, cornerPositions, FIGURES_EACH } from './surface-corners.ts';
import { BAND_POINTS } from './surface-lines.ts';
import type { SurfaceMesh } from './surface-mesh.ts';
import { WEAVE_CLOTH } from './surface-weave.ts';

const BANDS = 100 / BAND_POINTS;

const CORNER_PROGRAM = `#version 300 es
uniform mat4 u_matrix;
uniform float u_turns;
in vec2 a_position;
in vec3 a_figures;
out vec3 v_figures;
void main() {
  v_figures = a_figures;
  gl_Position = u_matrix * vec4(a_position.x + u_turns, a_position.y, 0.0, 1.0);
}`;

/** Threads are counted from a corner of the world, so that the cloth moves with the map. */
const POINT_PROGRAM = `#version 300 es
precision highp float;
uniform vec3 u_bands[${BANDS}];
uniform vec2 u_corner;
uniform float u_ratio;
in vec3 v_figures;
out vec4 colour;
const float SIZE = ${WEAVE_CLOTH.sizePx.toFixed(1)};
float thread(float across) {
  return clamp((${(WEAVE_CLOTH.threadPx / 2).toFixed(3)} - abs(mod(across, SIZE) - SIZE / 2.0)) * u_ratio + 0.5, 0.0, 1.0);
}
void main() {
  vec3 band = u_bands[clamp(int(v_figures.x / ${BAND_POINTS.toFixed(1)}), 0, ${BANDS - 1})];
  vec2 at = vec2(gl_FragCoord.x, -gl_FragCoord.y) / u_ratio + u_corner;
  float along = thread(at.x);
  float down = thread(at.y);
  float paper = mix(mix(${WEAVE_CLOTH.gap}, ${WEAVE_CLOTH.thread}, max(along, down)), ${WEAVE_CLOTH.crossing}, along * down);
  vec3 shown = mix(band, vec3(${opaqueShares(WEAVE_CLOTH.paper)}), paper * step(0.5, v_figures.z));
  float held = step(0.5, v_figures.y);
  colour = vec4(shown * held, held);
}`;

function opaqueShares(colour: string): string {
  const { red, green, blue } = opaque(colour);
  return [red, green, blue].map((channel) => (channel / 255).toFixed(4)).join(', ');
}

export interface SurfacePainter {
  readonly layer: CustomLayerInterface;
  show(mesh: SurfaceMesh, scores: Float32Array): void;
}

interface Shown {
  readonly mesh: SurfaceMesh;
  readonly scores: Float32Array;
}

/** @param end zoom from which on something else is drawn instead */
export function surfacePainter(id: string, end: number): SurfacePainter {
  let shown: Shown | null = null;
  /** What the graphics processor holds already. */
  let held: { mesh: SurfaceMesh | null; scores: Float32Array | null } = { mesh: null, scores: null };
  let map: MapLibreMap | null = null;
  let bench: Bench | null = null;
  return {
    show(mesh, scores) {
      shown = { mesh, scores };
      map?.triggerRepaint();
    },
    layer: {
      id,
      type: 'custom',
      onAdd(owner, gl) {
        map = owner;
        bench = makeBench(gl);
        held = { mesh: null, scores: null };
      },
      onRemove(_owner, gl) {
        if (bench !== null) clearBench(gl, bench);
        bench = null;
      },
      render(gl, { defaultProjectionData }) {
        if (map === null || bench === null || shown === null || map.getZoom() >= end) return;
        const { mesh, scores } = shown;
        takeUp(gl, bench.program);
        gl.bindVertexArray(bench.corners);
        if (held.mesh !== mesh) sendGround(gl, bench, mesh);
        if (held.mesh !== mesh || held.scores !== scores) sendFigures(gl, bench, shown);
        held = shown;
        const { width, height } = gl.canvas;
        const ratio = map.getPixelRatio();
        const [x, y] = cornerOfView(map, { widthPx: width / ratio, heightPx: height / ratio });
        gl.uniformMatrix4fv(bench.matrix, false, defaultProjectionData.mainMatrix);
        gl.uniform2f(bench.corner, x, y + height / ratio);
        gl.uniform1f(bench.ratio, ratio);
        for (const turns of turnsInView(map, mesh)) {
          gl.uniform1f(bench.turns, turns);
          gl.drawElements(gl.TRIANGLES, mesh.triangles.length, gl.UNSIGNED_INT, 0);
        }
        gl.bindVertexArray(null);
      },
    },
  };
}

/** What is laid out in the graphics processor. */
interface Bench {
  readonly program: WebGLProgram;
  readonly corners: WebGLVertexArrayObject;
  readonly positions: WebGLBuffer;
  readonly figures: WebGLBuffer;
  readonly triangles: WebGLBuffer;
  readonly matrix: WebGLUniformLocation | null;
  readonly turns: WebGLUniformLocation | null;
  readonly corner: WebGLUniformLocation | null;
  readonly ratio: WebGLUniformLocation | null;
}

function makeBench(gl: WebGL2RenderingContext): Bench {
  const program = gl.createProgram();
  for (const [kind, source] of [
    [gl.VERTEX_SHADER, CORNER_PROGRAM],
    [gl.FRAGMENT_SHADER, POINT_PROGRAM],
  ] as const) {
    const shader = gl.createShader(kind);
    if (shader === null) continue;
    gl.shaderSource(shader, source);
    gl.compileShader(shader);
    gl.attachShader(program, shader);
    gl.deleteShader(shader);
  }
  gl.linkProgram(program);
  if (!gl.getProgramParameter(program, gl.LINK_STATUS) && !gl.isContextLost()) {
    throw new Error(`The program that paints surfaces is refused: ${gl.getProgramInfoLog(program)}`);
  }
  const bench = {
    program,
    corners: gl.createVertexArray(),
    positions: gl.createBuffer(),
    figures: gl.createBuffer(),
    triangles: gl.createBuffer(),
    matrix: gl.getUniformLocation(program, 'u_matrix'),
    turns: gl.getUniformLocation(program, 'u_turns'),
    corner: gl.getUniformLocation(program, 'u_corner'),
    ratio: gl.getUniformLocation(program, 'u_ratio'),
  };
  takeUp(gl, program);
  gl.uniform3fv(gl.getUniformLocation(program, 'u_bands'), bandColours());
  gl.bindVertexArray(bench.corners);
  const column = (name: string, buffer: WebGLBuffer, each: number) => {
    const place = gl.getAttribLocation(program, name);
    gl.bindBuffer(gl.ARRAY_BUFFER, buffer);
    gl.enableVertexAttribArray(place);
    gl.vertexAttribPointer(place, each, gl.FLOAT, false, 0, 0);
  };
  column('a_position', bench.positions, 2);
  column('a_figures', bench.figures, FIGURES_EACH);
  gl.bindBuffer(gl.ELEMENT_ARRAY_BUFFER, bench.triangles);
  gl.bindVertexArray(null);
  return bench;
}

function takeUp(gl: WebGL2RenderingContext, program: WebGLProgram): void {
  // biome-ignore lint/correctness/useHookAtTopLevel: a call of WebGL, no hook of React
  gl.useProgram(program);
}

function clearBench(gl: WebGL2RenderingContext, { program, corners, positions, figures, triangles }: Bench): void {
  for (const buffer of [positions, figures, triangles]) gl.deleteBuffer(buffer);
  gl.deleteVertexArray(corners);
  gl.deleteProgram(program);
}

function sendGround(gl: WebGL2RenderingContext, { positions }: Bench, mesh: SurfaceMesh): void {
  gl.bindBuffer(gl.ARRAY_BUFFER, positions);
  gl.bufferData(gl.ARRAY_BUFFER, cornerPositions(mesh), gl.STATIC_DRAW);
  // Part of the corners that are bound.
  gl.bufferData(gl.ELEMENT_ARRAY_BUFFER, mesh.triangles, gl.STATIC_DRAW);
}

function sendFigures(gl: WebGL2RenderingContext, { figures }: Bench, { mesh, scores }: Shown): void {
  gl.bindBuffer(gl.ARRAY_BUFFER, figures);
  gl.bufferData(gl.ARRAY_BUFFER, cornerFigures(mesh, scores), gl.DYNAMIC_DRAW);
}

/** Red, green, blue of each band: the ramp at its middle. */
function bandColours(): number[] {
  return Array.from({ length: BANDS }, (_none, band) => {
    const { red, green, blue } = opaque(rampColour((band + 0.5) / BANDS));
    return [red / 255, green / 255, blue / 255];
  }).flat();
}

const TILE_PX = 512;

/** The upper left corner of the view on the whole world at its zoom, px, counted anew from thread to thread. */
function cornerOfView(map: MapLibreMap, view: { widthPx: number; heightPx: number }): readonly [x: number, y: number] {
  const { lng, lat } = map.getCenter();
  const world = TILE_PX * 2 ** map.getZoom();
  const x = ((lng + 180) / 360) * world - view.widthPx / 2;
  const y = ((1 - Math.asinh(Math.tan((lat * Math.PI) / 180)) / Math.PI) / 2) * world - view.heightPx / 2;
  return [x % WEAVE_CLOTH.sizePx, y % WEAVE_CLOTH.sizePx];
}

/** Whole turns about the Earth at which some of the surface may be seen. */
function turnsInView(map: MapLibreMap, { west, east }: SurfaceMesh): number[] {
  const bounds = map.getBounds();
  const first = Math.ceil((bounds.getWest() - east) / 360);
  const last = Math.floor((bounds.getEast() - west) / 360);
  return Array.from({ length: Math.max(0, last - first + 1) }, (_none, at) => first + at);
}
