let found: boolean | null = null;

/**
 * Whether maps are drawn without a graphics processor, by the main one: a browser then gives no picture to somebody who asks for
 * none that would be slow. Asked once.
 */
export function isDrawnInSoftware(): boolean {
  found ??= askForQuick() === null;
  return found;
}

function askForQuick(): WebGL2RenderingContext | null {
  const context = document.createElement('canvas').getContext('webgl2', { failIfMajorPerformanceCaveat: true });
  context?.getExtension('WEBGL_lose_context')?.loseContext();
  return context;
}
