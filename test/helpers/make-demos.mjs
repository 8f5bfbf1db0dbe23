/**
 * Writes the three demo schemes into assets/demo. Everything in them is invented: places, firms and people do not exist.
 * Run with `node test/helpers/make-demos.mjs`; the output is committed, and the same every time (a fixed start value).
 */
import { mkdirSync, writeFileSync } from 'node:fs';
import { resolve } from 'node:path';

const out = resolve(import.meta.dirname, '../../assets/demo');

/** Mulberry32: a small generator with a fixed start, so that the demo of 200 blocks is the same on every machine. */
function numbers(start) {
  let a = start >>> 0;
  return () => {
    a = (a + 0x6d2b79f5) >>> 0;
    let t = Math.imul(a ^ (a >>> 15), 1 | a);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

const r2 = (v) => Math.round(v * 100) / 100;
const box = (x, y, width, depth, turn = 0) => ({ at: [x, y], width, depth, ...(turn ? { turn } : {}) });

/** Each object of a list on a line of its own, so that a person can read and change the file. */
function write(name, scheme) {
  const lines = Object.entries(scheme).map(([key, value]) => {
    const list = Array.isArray(value) && value.length > 0 && typeof value[0] === 'object';
    const text = list ? `[\n${value.map((v) => `    ${JSON.stringify(v)}`).join(',\n')}\n  ]` : JSON.stringify(value);
    return `  ${JSON.stringify(key)}: ${text}`;
  });
  mkdirSync(out, { recursive: true });
  writeFileSync(resolve(out, `${name}.scheme.json`), `{\n${lines.join(',\n')}\n}\n`);
}

const GLASS = [
  {
    id: 'G1',
    name: 'double, low-e',
    g: 0.59,
    u: 1.2,
    light: 0.78,
    panes: 2,
    frame: 0.2,
    source: 'typical published value for the kind, not a product',
  },
  {
    id: 'G2',
    name: 'double, solar control',
    g: 0.36,
    u: 1.1,
    light: 0.62,
    panes: 2,
    coating: 3,
    frame: 0.15,
    source: 'typical published value for the kind, not a product',
  },
  {
    id: 'G3',
    name: 'triple, low-e',
    g: 0.52,
    u: 0.7,
    light: 0.71,
    panes: 3,
    frame: 0.22,
    source: 'typical published value for the kind, not a product',
  },
];

/** A three-storey infill at about 51° N, deep glass to the south and a west front of glass. */
function tannery() {
  const floors = [0.3, 3.4, 6.5];
  const rooms = [];
  const windows = [];
  const room = (id, name, use, x, y, w, d, floor, height = 2.7) =>
    rooms.push({ id, name, use, block: 'B1', box: box(x, y, w, d), floor, height });
  const window = (id, roomId, wall, from, sill, width, height, glass, devices, reveal = 0.12) =>
    windows.push({ id, room: roomId, wall, from, sill, width, height, reveal, glass, devices });

  // Main block B1: x -12..2, y -12..6, top 9.6. Street (south) side y = -12, yard (west) side x = -12.
  floors.forEach((floor, i) => {
    const s = i + 1;
    room(`${s}.1`, i === 0 ? 'Shop' : 'Living south', i === 0 ? 'shop' : 'living', -12, -12, 7, 6, floor);
    room(`${s}.2`, i === 0 ? 'Workroom' : 'Bedroom south', i === 0 ? 'office' : 'bedroom', -5, -12, 7, 5, floor);
    room(`${s}.3`, ['Office', 'Studio', 'Studio'][i], i === 0 ? 'office' : 'living', -12, -6, 6, 6, floor);
    room(`${s}.4`, ['Store', 'Bedroom west', 'Bedroom west'][i], i === 0 ? 'other' : 'bedroom', -12, 0, 5, 6, floor);
    room(`${s}.5`, ['Kitchen', 'Kitchen', 'Study'][i], i === 2 ? 'office' : 'kitchen', -3, 0, 5, 6, floor);
  });
  let n = 0;
  const id = () => `W${++n}`;
  floors.forEach((_, i) => {
    const s = i + 1;
    // South glass: wide and deep, an overhang over the two upper floors.
    window(id(), `${s}.1`, 0, 0.6, i === 0 ? 0.1 : 0.3, 5.6, i === 0 ? 2.4 : 2.2, 'G1', i === 0 ? ['D3'] : ['D1']);
    window(id(), `${s}.2`, 0, 0.9, 0.9, 2.2, 1.5, 'G1', i === 2 ? [] : ['D1']);
    // West front: glass from the floor up.
    window(id(), `${s}.1`, 3, 0.6, 0.9, 1.6, 1.5, 'G1', []);
    window(id(), `${s}.3`, 3, 0.5, 0.2, 4.9, 2.4, 'G1', i === 2 ? ['D2'] : []);
    window(
      id(),
      `${s}.4`,
      3,
      0.9,
      i === 0 ? 1.5 : 0.3,
      i === 0 ? 1.2 : 4.2,
      i === 0 ? 0.9 : 2.2,
      i === 1 ? 'G2' : 'G1',
      [],
    );
    // Yard side to the north and east.
    window(id(), `${s}.4`, 2, 1.2, 0.9, 1.4, 1.4, 'G3', []);
    // On the ground floor clear of the wing, which reaches up to y = 2.5.
    window(id(), `${s}.5`, 1, i === 0 ? 2.8 : 1.4, 0.9, 2.0, 1.4, 'G3', []);
    window(id(), `${s}.5`, 2, 1.2, 0.9, 1.5, 1.4, 'G3', []);
  });
  windows.push({
    id: id(),
    room: '3.5',
    roof: { at: [-1.6, 1.8] },
    width: 1.0,
    height: 1.2,
    reveal: 0.2,
    glass: 'G2',
    devices: [],
  });
  // A lower wing along the yard, B2: two rooms, one storey.
  rooms.push({
    id: '0.6',
    name: 'Garden room',
    use: 'living',
    block: 'B2',
    box: box(2, -2, 6, 4.5),
    floor: 0.3,
    height: 2.6,
  });
  windows.push({
    id: id(),
    room: '0.6',
    wall: 0,
    from: 0.7,
    sill: 0.1,
    width: 4.6,
    height: 2.3,
    reveal: 0.1,
    glass: 'G1',
    devices: ['D4'],
  });
  windows.push({
    id: id(),
    room: '0.6',
    wall: 1,
    from: 0.8,
    sill: 0.9,
    width: 1.8,
    height: 1.3,
    reveal: 0.1,
    glass: 'G1',
    devices: [],
  });

  write('tannery-yard', {
    format: 'shadewright',
    version: 1,
    title: 'Tannery Yard infill',
    author: 'Osier & Vane, designers (invented)',
    address: '12 Tannery Yard, Lower Marlowe (an invented place)',
    revision: 'P2',
    year: 2025,
    site: {
      latitude: 51.45,
      longitude: -2.59,
      zone: 'Europe/London',
      elevation: 18,
      north: 12,
      groundReflectance: 0.2,
      linkeTurbidity: 3.2,
      hottest: { maximum: 30.5, range: 10.5 },
      boundary: [
        [-14.5, -14.5],
        [16.5, -14.5],
        [16.5, 10],
        [-14.5, 10],
      ],
    },
    blocks: [
      { id: 'B1', name: 'Infill', standing: 'proposed', box: box(-12, -12, 14, 18), base: 0, height: 9.6 },
      { id: 'B2', name: 'Yard wing', standing: 'proposed', box: box(2, -2, 6, 4.5), base: 0, height: 3.2 },
      {
        id: 'R1',
        name: 'Old tannery',
        standing: 'removed',
        outline: [
          [-12, -9],
          [3, -9],
          [3, 1],
          [-4, 1],
          [-4, 5],
          [-12, 5],
        ],
        base: 0,
        height: 4.4,
      },
      { id: 'E1', name: 'Bark store', standing: 'existing', box: box(11.5, -13.5, 4.5, 7), base: 0, height: 3.6 },
      { id: 'N1', name: 'No. 8', standing: 'context', box: box(-34, -13, 11, 9), base: 0, height: 7.2 },
      { id: 'N2', name: 'No. 9', standing: 'context', box: box(-34, -2, 10, 10, 3), base: 0, height: 6.6 },
      {
        id: 'N3',
        name: 'Malt loft',
        standing: 'context',
        outline: [
          [-34, 12],
          [-21, 11],
          [-20, 20],
          [-27, 24],
          [-34, 21],
        ],
        base: 0,
        height: 8.5,
      },
      {
        id: 'N4',
        name: 'No. 14',
        standing: 'context',
        outline: [
          [-15, 15],
          [-4, 15],
          [-4, 23],
          [-8, 23],
          [-8, 26],
          [-15, 26],
        ],
        base: 0,
        height: 6.8,
      },
      { id: 'N5', name: 'No. 16', standing: 'context', box: box(-1, 15, 10, 9, -4), base: 0, height: 7.4 },
      { id: 'N6', name: 'No. 18', standing: 'context', box: box(12, 14.5, 9, 11), base: 0, height: 6.2 },
      { id: 'N7', name: 'Mill house', standing: 'context', box: box(25, 2, 12, 15, 8), base: 0, height: 10.5 },
      { id: 'N8', name: 'Tally office', standing: 'context', box: box(24, -16, 10, 12), base: 0, height: 5.4 },
      { id: 'N9', name: 'No. 3', standing: 'context', box: box(14, -37, 13, 9, -3), base: 0, height: 8.0 },
      { id: 'N10', name: 'No. 5', standing: 'context', box: box(-2, -36, 12, 8), base: 0, height: 6.4 },
      { id: 'N11', name: 'No. 7', standing: 'context', box: box(-17, -37, 12, 9, 2), base: 0, height: 7.0 },
      {
        id: 'N12',
        name: 'Chapel row',
        standing: 'context',
        outline: [
          [-36, -36],
          [-24, -36],
          [-24, -27],
          [-30, -24],
          [-36, -27],
        ],
        base: 0,
        height: 9.2,
      },
    ],
    rooms,
    windows,
    glass: GLASS,
    devices: [
      { id: 'D1', kind: 'overhang', name: 'south canopy', depth: 0.9, above: 0.15, left: 0.3, right: 0.3 },
      { id: 'D2', kind: 'fin', name: 'west fins', side: 'both', depth: 0.35, gap: 0.05 },
      { id: 'D3', kind: 'overhang', name: 'shop canopy', depth: 1.4, above: 0.1, left: 0.4, right: 0.4 },
      {
        id: 'D4',
        kind: 'louvres',
        name: 'garden louvres',
        count: 6,
        spacing: 0.2,
        depth: 0.18,
        tilt: 15,
        gap: 0.05,
        left: 0.1,
        right: 0.1,
      },
    ],
    trees: [
      {
        id: 'T1',
        name: 'lime in the yard',
        at: [13, 5],
        base: 0,
        trunk: 2.2,
        height: 8.5,
        spread: 5.5,
        transmittance: [0.6, 0.6, 0.55, 0.4, 0.25, 0.2, 0.2, 0.2, 0.25, 0.4, 0.55, 0.6],
      },
    ],
    weather: null,
    limits: 'example-gain',
    receptors: [
      {
        id: 'A1',
        kind: 'area',
        name: 'Courtyard',
        outline: [
          [3, 3.5],
          [11, 3.5],
          [11, 9.5],
          [3, 9.5],
        ],
        level: 0,
      },
      { id: 'P1', kind: 'point', name: 'bench by the lime', at: [9, 7, 1.2], normal: [0, 0, 1] },
      {
        id: 'V1',
        kind: 'window',
        name: 'No. 14, ground floor',
        block: 'N4',
        wall: 0,
        from: 3,
        sill: 0.9,
        width: 1.6,
        height: 1.4,
      },
      {
        id: 'V2',
        kind: 'window',
        name: 'No. 16, first floor',
        block: 'N5',
        wall: 0,
        from: 4,
        sill: 3.6,
        width: 1.4,
        height: 1.3,
      },
    ],
    sheets: [
      {
        id: 'S1',
        name: 'Shadow study',
        kind: 'shadow-study',
        dates: ['2025-03-21', '2025-06-21', '2025-12-21'],
        times: ['09:00', '12:00', '15:00'],
        scale: 1000,
        paper: 'A3',
        landscape: true,
      },
    ],
  });
}

/** A two-storey clinic at 34° S: the sun stands in the north, and summer is January. */
function southern() {
  const rooms = [];
  const windows = [];
  const south = [
    ['1.1', 'Waiting room', 'other', 0, 0, 8, 7],
    ['1.2', 'Consulting', 'office', 8, 0, 6, 5],
    ['1.3', 'Ward west', 'ward', 0, 7, 7, 7],
    ['1.4', 'Ward north', 'ward', 7, 8, 7, 6],
  ];
  [0.2, 3.7].forEach((floor, i) => {
    for (const [key, name, use, x, y, w, d] of south) {
      const id = `${i + 1}${key.slice(1)}`;
      rooms.push({
        id,
        name: i === 0 ? name : `${name}, upper`,
        use,
        block: 'C1',
        box: box(x, y, w, d),
        floor,
        height: 3.0,
      });
    }
    const s = i + 1;
    windows.push({
      id: `W${s}1`,
      room: `${s}.1`,
      wall: 3,
      from: 1,
      sill: 0.8,
      width: 4.5,
      height: 2.0,
      reveal: 0.1,
      glass: 'G1',
      devices: [],
    });
    windows.push({
      id: `W${s}2`,
      room: `${s}.2`,
      wall: 1,
      from: 0.8,
      sill: 0.9,
      width: 2.4,
      height: 1.6,
      reveal: 0.1,
      glass: 'G1',
      devices: [],
    });
    windows.push({
      id: `W${s}3`,
      room: `${s}.3`,
      wall: 3,
      from: 1,
      sill: 0.6,
      width: 5,
      height: 2.1,
      reveal: 0.1,
      glass: 'G1',
      devices: ['F1'],
    });
    windows.push({
      id: `W${s}4`,
      room: `${s}.3`,
      wall: 2,
      from: 1,
      sill: 0.6,
      width: 5,
      height: 2.1,
      reveal: 0.1,
      glass: 'G1',
      devices: ['O1'],
    });
    windows.push({
      id: `W${s}5`,
      room: `${s}.4`,
      wall: 2,
      from: 0.8,
      sill: 0.6,
      width: 5.2,
      height: 2.1,
      reveal: 0.1,
      glass: 'G1',
      devices: i === 0 ? ['O1'] : ['O1', 'B1'],
    });
  });
  write('jacaranda-clinic', {
    format: 'shadewright',
    version: 1,
    title: 'Jacaranda Road clinic',
    author: 'Plumbline Studio (invented)',
    address: '40 Jacaranda Road, Port Halloran (an invented place)',
    revision: 'A',
    year: 2025,
    site: {
      latitude: -33.9,
      longitude: 151.1,
      zone: 'Australia/Sydney',
      elevation: 32,
      north: -9,
      groundReflectance: 0.18,
      linkeTurbidity: 3.4,
      hottest: { maximum: 36, range: 12 },
      boundary: [
        [-4, -4],
        [19, -4],
        [19, 22],
        [-4, 22],
      ],
    },
    blocks: [
      { id: 'C1', name: 'Clinic', standing: 'proposed', box: box(0, 0, 14, 14), base: 0, height: 7.4 },
      { id: 'C2', name: 'Porch roof', standing: 'proposed', box: box(14, 5, 3, 4), base: 2.9, height: 0.25 },
      { id: 'R1', name: 'Old bungalow', standing: 'removed', box: box(2, 1, 10, 9), base: 0, height: 4.2 },
      { id: 'N1', name: 'No. 38', standing: 'context', box: box(-18, 0, 10, 12), base: 0, height: 6.5 },
      { id: 'N2', name: 'No. 42', standing: 'context', box: box(24, -2, 11, 13), base: 0, height: 7 },
      {
        id: 'N3',
        name: 'Flats',
        standing: 'context',
        outline: [
          [-6, 27],
          [14, 27],
          [14, 37],
          [6, 37],
          [6, 42],
          [-6, 42],
        ],
        base: 0,
        height: 12,
      },
      { id: 'N4', name: 'No. 41', standing: 'context', box: box(-4, -26, 9, 9), base: 0, height: 5.5 },
      { id: 'N5', name: 'No. 43', standing: 'context', box: box(9, -26, 10, 9), base: 0, height: 6 },
    ],
    rooms,
    windows,
    glass: GLASS,
    devices: [
      { id: 'O1', kind: 'overhang', name: 'north eaves', depth: 1.2, above: 0.3, left: 0.6, right: 0.6 },
      { id: 'F1', kind: 'fin', name: 'west fins', side: 'both', depth: 0.5, gap: 0.05 },
      {
        id: 'B1',
        kind: 'blind',
        name: 'outside screen',
        place: 'external',
        transmittance: 0.08,
        reflectance: 0.45,
        closedAbove: 250,
      },
    ],
    trees: [
      {
        id: 'T1',
        name: 'jacaranda',
        at: [-5, 18],
        base: 0,
        trunk: 2.5,
        height: 9,
        spread: 8,
        transmittance: [0.2, 0.2, 0.22, 0.25, 0.3, 0.35, 0.4, 0.45, 0.45, 0.35, 0.25, 0.2],
      },
    ],
    weather: null,
    limits: 'example-gain',
    receptors: [
      {
        id: 'A1',
        kind: 'area',
        name: 'Garden',
        outline: [
          [1, 15],
          [13, 15],
          [13, 21],
          [1, 21],
        ],
        level: 0,
      },
      { id: 'V1', kind: 'window', name: 'No. 41', block: 'N4', wall: 2, from: 3, sill: 0.9, width: 1.8, height: 1.5 },
    ],
    sheets: [
      {
        id: 'S1',
        name: 'Shadow study',
        kind: 'shadow-study',
        dates: ['2025-03-21', '2025-06-21', '2025-12-21'],
        times: ['09:00', '12:00', '15:00'],
        scale: 1000,
        paper: 'A3',
        landscape: true,
      },
    ],
  });
}

/** Two hundred blocks of a town round a slab of 50 rooms and 200 windows: for speed work. */
function town() {
  const random = numbers(20_260_601);
  const blocks = [{ id: 'S1', name: 'Slab', standing: 'proposed', box: box(-16, -6, 32, 12), base: 0, height: 16.2 }];
  const step = 26;
  for (let j = -7; j <= 7 && blocks.length <= 200; j++) {
    for (let i = -7; i <= 7 && blocks.length <= 200; i++) {
      if (Math.abs(i) <= 1 && Math.abs(j) <= 0) continue;
      const k = blocks.length;
      const w = r2(9 + random() * 9);
      const d = r2(8 + random() * 9);
      const x = r2(i * step - w / 2 + (random() - 0.5) * 5);
      const y = r2(j * step - d / 2 + (random() - 0.5) * 5);
      const height = r2(4 + random() * random() * 22);
      const standing = k === 60 ? 'removed' : 'context';
      if (random() < 0.2) {
        const c = r2(w * 0.55);
        const e = r2(d * 0.5);
        blocks.push({
          id: `C${k}`,
          name: `Court ${k}`,
          standing,
          outline: [
            [x, y],
            [r2(x + w), y],
            [r2(x + w), r2(y + e)],
            [r2(x + c), r2(y + e)],
            [r2(x + c), r2(y + d)],
            [x, r2(y + d)],
          ],
          base: 0,
          height,
        });
      } else {
        blocks.push({
          id: `C${k}`,
          name: `House ${k}`,
          standing,
          box: box(x, y, w, d, Math.round((random() - 0.5) * 24)),
          base: 0,
          height,
        });
      }
    }
  }
  const rooms = [];
  const windows = [];
  for (let s = 0; s < 5; s++) {
    for (let k = 0; k < 5; k++) {
      for (const side of ['S', 'N']) {
        const id = `${s + 1}${side}${k + 1}`;
        const x = r2(-16 + k * 6.4);
        rooms.push({
          id,
          name: `Flat ${id}`,
          use: k % 2 ? 'bedroom' : 'living',
          block: 'S1',
          box: box(x, side === 'S' ? -6 : 1, 6.4, 5),
          floor: r2(0.3 + s * 3.1),
          height: 2.7,
        });
        for (let w = 0; w < 4; w++) {
          // The end rooms turn their fourth window to the gable; upper floors have more glass.
          const end = (k === 0 && w === 3 && 3) || (k === 4 && w === 3 && 1);
          const wall = end || (side === 'S' ? 0 : 2);
          const size = end
            ? { from: 0.8, sill: 0.3, width: 3.4, height: 2.2 }
            : { from: r2(0.3 + w * 1.5), sill: s < 3 ? 0.8 : 0.2, width: 1.3, height: s < 3 ? 1.6 : 2.3 };
          windows.push({
            id: `${id}-${w + 1}`,
            room: id,
            wall,
            ...size,
            reveal: 0.1,
            glass: w % 2 && !end ? 'G2' : 'G1',
            devices: side === 'S' && s < 4 && !end ? ['D1'] : [],
          });
        }
      }
    }
  }
  write('two-hundred-blocks', {
    format: 'shadewright',
    version: 1,
    title: 'Quarter of two hundred blocks',
    author: 'Shadewright demo',
    address: 'An invented town, for speed work',
    revision: '1',
    year: 2025,
    site: {
      latitude: 48.2,
      longitude: 11.6,
      zone: 'Europe/Berlin',
      elevation: 510,
      north: 0,
      groundReflectance: 0.2,
      linkeTurbidity: 3.3,
      hottest: { maximum: 33, range: 12 },
      boundary: [
        [-22, -14],
        [22, -14],
        [22, 18],
        [-22, 18],
      ],
    },
    blocks,
    rooms,
    windows,
    glass: GLASS,
    devices: [{ id: 'D1', kind: 'overhang', name: 'balcony edge', depth: 0.8, above: 0.2, left: 0.2, right: 0.2 }],
    trees: [],
    weather: null,
    limits: 'example-gain',
    receptors: [
      {
        id: 'A1',
        kind: 'area',
        name: 'Green',
        outline: [
          [-18, 7.5],
          [18, 7.5],
          [18, 16],
          [-18, 16],
        ],
        level: 0,
      },
    ],
    sheets: [
      {
        id: 'S1',
        name: 'Shadow study',
        kind: 'shadow-study',
        dates: ['2025-03-21', '2025-06-21', '2025-12-21'],
        times: ['09:00', '12:00', '15:00'],
        paper: 'A1',
        landscape: true,
      },
    ],
  });
}

tannery();
southern();
town();
