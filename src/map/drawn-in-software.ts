let found: boolean | null = null;

/** What the common drivers that draw by the main processor call themselves. */
const SOFTWARE = /swiftshader|llvmpipe|softpipe|lavapipe|software|basic render/i;

/** Whether maps are drawn without a graphics processor, as on a virtual desktop or a server. Asked once. */
export function isDrawnInSoftware(): boolean {
  found ??= ask();
  return found;
}

function ask(): boolean {
  const gl = document.createElement('canvas').getContext('webgl2', { failIfMajorPerformanceCaveat: true });
  // Asked for none that is slow, a browser gives none.
  if (gl === null) return true;
  const naming = gl.getExtension('WEBGL_debug_renderer_info');
  const name: unknown = gl.getParameter(naming?.UNMASKED_RENDERER_WEBGL ?? gl.RENDERER);
  gl.getExtension('WEBGL_lose_context')?.loseContext();
  return typeof name === 'string' && SOFTWARE.test(name);
}
