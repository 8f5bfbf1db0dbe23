/** Whether pictures are drawn by the processor: smoothing edges as the card does then costs more than all the rest. */
export function drawsInSoftware(): boolean {
  const probe = document.createElement('canvas').getContext('webgl2');
  if (probe === null) return true;
  const name = String(
    probe.getParameter(probe.getExtension('WEBGL_debug_renderer_info')?.UNMASKED_RENDERER_WEBGL ?? probe.RENDERER),
  );
  probe.getExtension('WEBGL_lose_context')?.loseContext();
  return /swiftshader|llvmpipe|software|basic render/i.test(name);
}
