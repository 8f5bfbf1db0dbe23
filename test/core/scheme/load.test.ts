import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { loadScheme } from '../../../core/scheme/load.ts';
import { migrate } from '../../../core/scheme/migrate.ts';
import type { Scheme } from '../../../core/scheme/schema.ts';
import { writeScheme } from '../../../core/scheme/write.ts';
import { seedOf } from '../../helpers/property-seed.ts';

const demo = (name: string) =>
  readFileSync(resolve(import.meta.dirname, `../../../assets/demo/${name}.scheme.json`), 'utf8');
const DEMOS = ['tannery-yard', 'jacaranda-clinic', 'two-hundred-blocks'];

const tannery = () => JSON.parse(demo('tannery-yard'));
/** The demo with a change, and what the loader says of it. */
const changed = (change: (scheme: ReturnType<typeof tannery>) => void) => {
  const scheme = tannery();
  change(scheme);
  return loadScheme(JSON.stringify(scheme));
};
const faultsOf = (result: ReturnType<typeof loadScheme>) =>
  result.ok ? [] : result.faults.map((f) => `${f.place} [${f.code}] ${f.message}`);

describe('a sound file', () => {
  test.each(DEMOS)('%s loads without a word', (name) => {
    const result = loadScheme(demo(name));
    expect(faultsOf(result)).toEqual([]);
    expect(result.ok && result.notes).toEqual([]);
  });

  test.each(DEMOS)('%s comes back the same after writing and reading, and the text settles at once', (name) => {
    const first = loadScheme(demo(name));
    if (!first.ok) throw new Error('demo does not load');
    const text = writeScheme(first.value);
    const second = loadScheme(text);
    expect(second.ok && second.value).toEqual(first.value);
    expect(writeScheme((second as { value: Scheme }).value)).toBe(text);
  });

  test('fields that this version does not know are kept and written back', () => {
    const result = changed((s) => {
      s.later = { deep: [1, 2] };
      s.blocks[0].paint = 'ochre';
      s.site.survey = 'S-12';
    });
    if (!result.ok) throw new Error(faultsOf(result).join('\n'));
    const again = JSON.parse(writeScheme(result.value));
    expect(again.later).toEqual({ deep: [1, 2] });
    expect(again.blocks[0].paint).toBe('ochre');
    expect(again.site.survey).toBe('S-12');
  });

  test('the order of keys in the file does not matter to the text written', () => {
    const shuffled = fc.sample(
      fc.shuffledSubarray(Object.keys(tannery()), { minLength: Object.keys(tannery()).length }),
      { numRuns: 5, seed: seedOf(1) },
    );
    const plain = loadScheme(demo('tannery-yard'));
    for (const order of shuffled) {
      const source = tannery();
      const result = loadScheme(JSON.stringify(Object.fromEntries(order.map((k) => [k, source[k]]))));
      expect(result.ok && writeScheme(result.value)).toBe(plain.ok && writeScheme(plain.value));
    }
  });

  test('a byte order mark is let pass', () => {
    expect(loadScheme(`\ufeff${demo('tannery-yard')}`).ok).toBe(true);
  });
});

describe('a bad file is refused with the place of every fault', () => {
  test('not JSON: the line and column', () => {
    const result = loadScheme('{\n  "format": "shadewright",\n  "version": NaN\n}');
    expect(result.ok).toBe(false);
    expect(!result.ok && result.faults[0]?.place).toMatch(/^line 3/);
  });

  test.each([
    ['null', 'null'],
    ['a list', '[]'],
    ['a text', '"scheme"'],
    ['another object', '{"format":"something"}'],
    ['nothing', ''],
  ])('%s is not a scheme', (_, text) => {
    expect(loadScheme(text).ok).toBe(false);
  });

  test('the words for a wrong number are those of the design: place, bound, what stood there', () => {
    expect(
      faultsOf(
        changed((s) => {
          s.windows[0].width = -1;
        }),
      ),
    ).toEqual(['windows[0].width [out-of-range] must be more than 0, got -1']);
    expect(
      faultsOf(
        changed((s) => {
          s.site.latitude = 91;
        }),
      ),
    ).toEqual(['site.latitude [out-of-range] must be at most 90, got 91']);
    expect(
      faultsOf(
        changed((s) => {
          s.site.longitude = 540;
        }),
      ),
    ).toEqual(['site.longitude [out-of-range] must be at most 180, got 540']);
    expect(
      faultsOf(
        changed((s) => {
          s.glass[0].g = 1.7;
        }),
      ),
    ).toEqual(['glass[0].g [out-of-range] must be at most 1, got 1.7']);
    expect(
      faultsOf(
        changed((s) => {
          s.site.linkeTurbidity = -1;
        }),
      )[0],
    ).toMatch(/^site\.linkeTurbidity/);
  });

  test('several faults come together', () => {
    const found = faultsOf(
      changed((s) => {
        s.windows[0].width = 'wide';
        s.blocks[2].height = null;
        delete s.rooms[1].floor;
        s.rooms[2].use = 'ballroom';
      }),
    );
    expect(found).toHaveLength(4);
    expect(found.join('\n')).toContain('windows[0].width [wrong-type] must be a number, got "wide"');
    expect(found.join('\n')).toContain('rooms[1].floor [missing]');
    expect(found.join('\n')).toContain('rooms[2].use [not-a-choice]');
  });

  test('infinite numbers and unknown device kinds', () => {
    expect(loadScheme(demo('tannery-yard').replace('"latitude":51.45', '"latitude":1e999')).ok).toBe(false);
    expect(
      faultsOf(
        changed((s) => {
          s.devices[0].kind = 'umbrella';
        }),
      )[0],
    ).toContain('devices[0]');
  });

  test('a zone that does not exist, or a bare offset', () => {
    expect(
      faultsOf(
        changed((s) => {
          s.site.zone = 'Europe/Atlantis';
        }),
      )[0],
    ).toContain('site.zone [unknown-zone]');
    expect(
      faultsOf(
        changed((s) => {
          s.site.zone = '+01:00';
        }),
      )[0],
    ).toContain('site.zone [unknown-zone]');
  });

  test('references to what is not there, and ids that stand twice', () => {
    expect(
      faultsOf(
        changed((s) => {
          s.windows[3].room = 'nowhere';
        }),
      )[0],
    ).toContain('windows[3].room [unknown-room]');
    expect(
      faultsOf(
        changed((s) => {
          s.windows[3].devices = ['D9'];
        }),
      )[0],
    ).toContain('windows[3].devices[0] [unknown-device]');
    expect(
      faultsOf(
        changed((s) => {
          s.blocks[1].id = 'B1';
        }),
      )[0],
    ).toContain('blocks[1].id [repeated-id]');
  });

  test('a newer version is refused, not guessed', () => {
    expect(
      faultsOf(
        changed((s) => {
          s.version = 2;
        }),
      )[0],
    ).toContain('version [version] the file is of version 2');
    expect(
      faultsOf(
        changed((s) => {
          s.version = 'one';
        }),
      )[0],
    ).toContain('version [version]');
  });

  test('a key that reaches for the prototype', () => {
    expect(
      faultsOf(loadScheme(demo('tannery-yard').replace('"format"', '"__proto__":{"polluted":true},"format"')))[0],
    ).toContain('[forbidden-key]');
    expect(({} as { polluted?: boolean }).polluted).toBeUndefined();
  });
});

describe('geometry that contradicts itself is named', () => {
  test('a window outside its wall, along and up', () => {
    expect(
      faultsOf(
        changed((s) => {
          s.windows[0].width = 9;
        }),
      )[0],
    ).toContain('windows[0] [window-outside-wall] the window runs from 0.6 m to 9.6 m along a wall of 7 m');
    expect(
      faultsOf(
        changed((s) => {
          s.windows[0].height = 4;
        }),
      )[0],
    ).toContain('windows[0] [window-outside-wall]');
    expect(
      faultsOf(
        changed((s) => {
          s.windows[0].wall = 7;
        }),
      )[0],
    ).toContain('windows[0].wall [unknown-wall]');
  });

  test('a window in a wall between two rooms', () => {
    expect(
      faultsOf(
        changed((s) => {
          s.windows[0].wall = 1;
          s.windows[0].width = 2;
        }),
      )[0],
    ).toContain('windows[0].wall [inside-wall]');
  });

  test('two windows over each other', () => {
    expect(
      faultsOf(
        changed((s) => {
          s.windows.push({ ...s.windows[0], id: 'W99', from: 1 });
        }),
      ).join(),
    ).toContain('[windows-overlap]');
  });

  test('an outline that crosses itself, repeats a corner or has no area', () => {
    expect(
      faultsOf(
        changed((s) => {
          s.blocks[6].outline = [
            [0, 0],
            [10, 10],
            [10, 0],
            [0, 10],
          ];
        }),
      )[0],
    ).toContain('blocks[6].outline [self-crossing]');
    expect(
      faultsOf(
        changed((s) => {
          s.blocks[6].outline = [
            [0, 0],
            [10, 0],
            [10, 10],
            [0, 0],
          ];
        }),
      )[0],
    ).toContain('blocks[6].outline [repeated-corner]');
    expect(
      faultsOf(
        changed((s) => {
          s.blocks[6].outline = [
            [0, 0],
            [10, 0],
            [20, 0],
          ];
        }),
      )[0],
    ).toContain('blocks[6].outline');
  });

  test('a room outside its block, in plan and in height', () => {
    expect(
      faultsOf(
        changed((s) => {
          s.rooms[0].box.at = [-20, -12];
        }),
      ).join(),
    ).toContain('rooms[0] [room-outside-block]');
    expect(
      faultsOf(
        changed((s) => {
          s.rooms[0].floor = 8;
        }),
      ).join(),
    ).toContain('rooms[0].floor [room-outside-block]');
  });

  test('rooms that share space, devices that stand twice: told, not refused', () => {
    const rooms = changed((s) => {
      s.rooms[1].box.at = [-8, -12];
      s.rooms[1].box.width = 5;
    });
    expect(rooms.ok && rooms.notes.map((n) => n.code)).toContain('rooms-overlap');
    const devices = changed((s) => {
      s.windows[0].devices = ['D1', 'D3'];
    });
    expect(devices.ok && devices.notes.map((n) => n.code)).toEqual(['devices-overlap']);
  });

  test('blocks a hundred kilometres apart', () => {
    expect(
      faultsOf(
        changed((s) => {
          s.blocks[5].box.at = [90_000, 0];
        }),
      )[0],
    ).toContain('blocks [too-wide]');
  });
});

describe('large input', () => {
  test('ten thousand blocks load in the time of a breath', () => {
    const result = changed((s) => {
      for (let i = 0; i < 10_000; i++)
        s.blocks.push({
          id: `X${i}`,
          standing: 'context',
          box: { at: [(i % 100) * 20 - 1000, Math.floor(i / 100) * 20 - 3000], width: 9, depth: 8 },
          height: 6,
        });
    });
    expect(result.ok && result.value.blocks.length).toBe(10_016);
  });

  test('more blocks than the bound are refused with the bound named', () => {
    const found = faultsOf(
      changed((s) => {
        s.blocks = Array.from({ length: 20_001 }, (_, i) => ({
          id: `X${i}`,
          standing: 'context',
          box: { at: [0, 0], width: 9, depth: 8 },
          height: 6,
        }));
      }),
    );
    expect(found.join()).toContain('20000');
  });
});

test('any JSON at all is answered with a value, never a throw', () => {
  fc.assert(
    fc.property(fc.jsonValue(), (value) => {
      expect(loadScheme(JSON.stringify(value)).ok).toBe(false);
      const dressed = loadScheme(
        JSON.stringify({ format: 'shadewright', version: 1, site: value, blocks: value, rooms: [value] }),
      );
      expect(dressed.ok).toBe(false);
    }),
    { numRuns: 300 },
  );
});

describe('migration', () => {
  const steps = [
    { from: 1, migrate: (old: Record<string, unknown>) => ({ ...old, title: old['name'] }) },
    { from: 2, migrate: (old: Record<string, unknown>) => ({ ...old, marked: true }) },
  ];
  test("runs each step from the file's version on, in order", () => {
    expect(migrate({ version: 1, name: 'x' }, steps, 3)).toEqual({
      ok: true,
      value: { version: 3, name: 'x', title: 'x', marked: true },
    });
    expect(migrate({ version: 2, title: 'y' }, steps, 3)).toEqual({
      ok: true,
      value: { version: 3, title: 'y', marked: true },
    });
  });
  test("a gap in the steps is our own fault, not the user's", () => {
    expect(() => migrate({ version: 1 }, steps.slice(1), 3)).toThrow('no migration from version 1');
  });
});
