import fc from 'fast-check';
import { expect, test } from 'vitest';
import { CHANNELS } from '../../../app/contract/channels.ts';
import { contract } from '../../../app/contract/host.ts';
import { decode, encode } from '../../../app/contract/wire.ts';

test('the list of names is the table, in its order or another', () => {
  expect([...CHANNELS].sort()).toEqual(Object.keys(contract).sort());
});

test('what is sent arrives: any JSON with bytes anywhere in it', () => {
  const leaf = fc.oneof(
    fc.string(),
    fc.double({ noNaN: true, noDefaultInfinity: true }).map((x) => (Object.is(x, -0) ? 0 : x)),
    fc.boolean(),
    fc.constant(null),
    fc.uint8Array({ maxLength: 300 }),
  );
  const { message } = fc.letrec((tie) => ({
    message: fc.oneof(
      { maxDepth: 4 },
      leaf,
      fc.array(tie('message'), { maxLength: 5 }),
      fc.dictionary(
        fc.string().filter((k) => k !== '$bytes' && k !== '__proto__'),
        tie('message'),
        { maxKeys: 5, noNullPrototype: true },
      ),
    ),
  }));
  fc.assert(
    fc.property(message, (value) => {
      expect(decode(encode(value))).toEqual(value);
    }),
  );
});

test('base64 is the standard one (RFC 4648 §10 vectors)', () => {
  const vectors = {
    '': '',
    f: 'Zg==',
    fo: 'Zm8=',
    foo: 'Zm9v',
    foob: 'Zm9vYg==',
    fooba: 'Zm9vYmE=',
    foobar: 'Zm9vYmFy',
  };
  for (const [plain, coded] of Object.entries(vectors))
    expect(encode(new TextEncoder().encode(plain))).toBe(`{"$bytes":"${coded}"}`);
});

test('undefined fields are left out, as over any wire', () => {
  expect(decode(encode({ a: 1, b: undefined, c: [undefined] }))).toEqual({ a: 1, c: [null] });
});

test('a message reaches no prototype, and only an object that is bytes becomes bytes', () => {
  const hostile = decode('{"__proto__":{"polluted":true},"x":{"$bytes":"AA==","more":1},"y":{"$bytes":7}}') as Record<
    string,
    unknown
  >;
  expect(({} as Record<string, unknown>).polluted).toBeUndefined();
  expect(hostile.x).toEqual({ $bytes: 'AA==', more: 1 });
  expect(hostile.y).toEqual({ $bytes: 7 });
});

test('what JSON has no word for is refused on the way out, broken text on the way in', () => {
  expect(() => encode({ f: () => 1 })).toThrow(TypeError);
  expect(() => encode({ n: 10n })).toThrow(TypeError);
  expect(() => decode('{"a":')).toThrow();
  expect(() => decode('{"$bytes":"not base64!"}')).toThrow();
});

test('a large file survives', () => {
  const bytes = Uint8Array.from({ length: 3_000_001 }, (_, i) => (i * 31) & 255);
  const { bytes: arrived } = decode(encode({ bytes })) as { bytes: Uint8Array };
  expect(Buffer.compare(arrived, bytes)).toBe(0);
});
