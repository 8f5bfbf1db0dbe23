import type { Fault } from './fault.ts';
import type { Scheme } from './schema.ts';

/** More than this over 1 is no rounding of a data sheet. */
const ROUNDING = 1e-9;

/** Values of devices and trees that contradict each other: a blind that gives more than it gets, a tree without a crown. */
export function checkStock(scheme: Scheme): Fault[] {
  const faults: Fault[] = [];
  scheme.devices.forEach((device, i) => {
    if (device.kind !== 'blind' || device.transmittance + device.reflectance <= 1 + ROUNDING) return;
    faults.push({
      level: 'error',
      code: 'more-than-all',
      place: `devices[${i}]`,
      message: `transmittance ${device.transmittance} and reflectance ${device.reflectance} are together more than 1`,
      cure: 'check both against the data sheet: what is left over is what the blind takes up',
    });
  });
  scheme.trees.forEach((tree, i) => {
    if (tree.trunk < tree.height) return;
    faults.push({
      level: 'warning',
      code: 'no-crown',
      place: `trees[${i}]`,
      message: `its trunk of ${tree.trunk} m leaves no crown in a height of ${tree.height} m, so it shades nothing`,
      cure: 'check trunk and height',
    });
  });
  return faults;
}
