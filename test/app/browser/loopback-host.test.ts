import { connect } from 'node:net';
import { networkInterfaces } from 'node:os';
import { request } from 'node:http';
import { describe, expect, test } from 'vitest';
import { encode, LAUNCH_HEADER, SESSION_HEADER } from '../../../app/contract/wire.ts';
import { claim, launchToken, pageHeaders, runningHost, send } from '../../helpers/host-client.ts';
import { tempFolder } from '../../helpers/temp-folder.ts';

const hello = '/host/host:hello';

describe('the screens', () => {
  test('come with the content policy and every other header, refusals too', async () => {
    const { port } = await runningHost({ dataDir: tempFolder() });
    const page = await send(port, 'GET', '/', { host: `127.0.0.1:${port}` });
    expect(page.status).toBe(200);
    expect(page.text).toContain('<!doctype html>');
    const missing = await send(port, 'GET', '/no-such.js', { host: `127.0.0.1:${port}` });
    expect(missing.status).toBe(404);
    const refused = await send(port, 'POST', hello, pageHeaders(port));
    for (const heard of [page, missing, refused]) {
      expect(heard.headers['content-security-policy']).toContain(
        "default-src 'none'; script-src 'self'; style-src 'self'",
      );
      expect(heard.headers['content-security-policy']).toContain("frame-ancestors 'none'");
      expect(heard.headers['x-content-type-options']).toBe('nosniff');
      expect(heard.headers['access-control-allow-origin']).toBeUndefined();
      expect(heard.headers['cache-control']).toBe('no-store');
    }
    expect(page.headers['content-type']).toBe('text/html; charset=utf-8');
  });

  test.each([
    '/../package.json',
    '/..%2fpackage.json',
    '/%2e%2e/%2e%2e/package.json',
    '/assets/..%5c..%5cpackage.json',
    '//etc/passwd',
    '/%00index.html',
    '/.git/config',
    '/%E0%A4%A',
    '/../renderer-beside/index.html',
  ])('never leave their folder: %s', async (path) => {
    const { port } = await runningHost({ dataDir: tempFolder() });
    const heard = await send(port, 'GET', path, { host: `127.0.0.1:${port}` });
    expect(heard.status).toBe(404);
    expect(heard.text).not.toContain('shadewright"');
  });

  test('are read and nothing else', async () => {
    const { port } = await runningHost({ dataDir: tempFolder() });
    for (const method of ['PUT', 'DELETE', 'OPTIONS', 'PATCH'])
      expect((await send(port, method, '/', pageHeaders(port))).status).toBe(405);
  });
});

describe('who may ask', () => {
  test('a request that names another host is refused: another site whose name was pointed here (DNS rebinding)', async () => {
    const { port } = await runningHost({ dataDir: tempFolder() });
    for (const host of ['evil.example', `evil.example:${port}`, `localhost:${port}`, '127.0.0.1', ''])
      expect((await send(port, 'GET', '/', { host })).status, host).toBe(403);
  });

  test('a call from another origin, or from none, is refused', async () => {
    const host = await runningHost({ dataDir: tempFolder() });
    const session = await claim(host);
    const good = pageHeaders(host.port, { [SESSION_HEADER]: session });
    expect((await send(host.port, 'POST', hello, good, 'null')).status).toBe(200);
    for (const origin of [
      'http://evil.example',
      'null',
      `http://localhost:${host.port}`,
      `https://127.0.0.1:${host.port}`,
    ])
      expect((await send(host.port, 'POST', hello, { ...good, origin }, 'null')).status).toBe(403);
    const { origin: _, ...without } = good;
    expect((await send(host.port, 'POST', hello, without, 'null')).status).toBe(403);
  });

  test('the token in the address works once, and the session only as given', async () => {
    const host = await runningHost({ dataDir: tempFolder() });
    const headers = pageHeaders(host.port, { [LAUNCH_HEADER]: launchToken(host.url) });
    for (const wrong of ['', 'x', `${launchToken(host.url)}x`])
      expect((await send(host.port, 'POST', '/claim', { ...headers, [LAUNCH_HEADER]: wrong })).status).toBe(403);
    const first = await send(host.port, 'POST', '/claim', headers);
    expect(first.status).toBe(200);
    expect((await send(host.port, 'POST', '/claim', headers)).status).toBe(403);
    for (const session of ['', 'x', launchToken(host.url)])
      expect(
        (await send(host.port, 'POST', hello, pageHeaders(host.port, { [SESSION_HEADER]: session }), 'null')).status,
      ).toBe(403);
  });

  test('a new address ends the session before it', async () => {
    const host = await runningHost({ dataDir: tempFolder() });
    const session = await claim(host);
    const token = launchToken(host.newAddress());
    const call = () => send(host.port, 'POST', hello, pageHeaders(host.port, { [SESSION_HEADER]: session }), 'null');
    expect((await call()).status).toBe(403);
    const again = await send(host.port, 'POST', '/claim', pageHeaders(host.port, { [LAUNCH_HEADER]: token }));
    expect(again.status).toBe(200);
  });

  test('the token is long, and another each time', async () => {
    const tokens = await Promise.all(
      [1, 2, 3].map(async () => launchToken((await runningHost({ dataDir: tempFolder() })).url)),
    );
    expect(new Set(tokens).size).toBe(3);
    for (const token of tokens) expect(Buffer.from(token, 'base64url').length).toBe(32);
  });

  test('only this machine reaches it', async () => {
    const { port } = await runningHost({ dataDir: tempFolder() });
    const others = Object.values(networkInterfaces()).flatMap((list) =>
      (list ?? []).filter((a) => !a.internal && a.family === 'IPv4').map((a) => a.address),
    );
    for (const address of ['127.0.0.2', ...others]) {
      const reached = await new Promise<boolean>((settle) => {
        const socket = connect({ host: address, port, timeout: 2000 }, () => settle(true));
        socket.on('error', () => settle(false));
        socket.on('timeout', () => settle(false));
        socket.on('close', () => socket.destroy());
      });
      expect(reached, address).toBe(false);
    }
  });
});

describe('messages', () => {
  async function signedIn() {
    const host = await runningHost({ dataDir: tempFolder() });
    const headers = pageHeaders(host.port, { [SESSION_HEADER]: await claim(host) });
    return (path: string, body: string) => send(host.port, 'POST', path, headers, body);
  }

  test('that are no JSON, or go nowhere, are refused in words', async () => {
    const post = await signedIn();
    expect(await post(hello, '{')).toMatchObject({ status: 400 });
    expect((await post(hello, '{')).text).toContain('not JSON');
    expect((await post('/elsewhere', 'null')).status).toBe(404);
    expect((await post('/host/', 'null')).text).toContain('no such channel');
    expect((await post('/host/__proto__', 'null')).text).toContain('no such channel');
  });

  test('longer than the bound are refused in words', async () => {
    const post = await signedIn();
    const heard = await post(hello, `"${'x'.repeat(97 * 1024 * 1024)}"`);
    expect(heard.status).toBe(413);
    expect(heard.text).toContain('too large');
    expect((await post(hello, 'null')).status, 'the host goes on').toBe(200);
  });

  test('that need a dialog are the page’s own', async () => {
    const post = await signedIn();
    const bytes = new Uint8Array(1);
    const asks = {
      'scheme:open': null,
      'weather:open': null,
      'scheme:save-as': { name: 'n', bytes },
      'export:write': { name: 'n', bytes },
    };
    for (const [channel, ask] of Object.entries(asks))
      expect(JSON.parse((await post(`/host/${channel}`, encode(ask))).text)).toEqual({
        ok: false,
        code: 'forbidden',
        message: 'dialog:page',
      });
  });
});

test('a window that lets go of its held request, and comes back with none, counts as closed', async () => {
  let isClosed = false;
  const host = await runningHost({ dataDir: tempFolder(), grace_ms: 400, onWindowClosed: () => (isClosed = true) });
  const headers = pageHeaders(host.port, { [SESSION_HEADER]: await claim(host) });
  const hold = () =>
    new Promise<() => void>((held) => {
      const asked = request(
        { host: '127.0.0.1', port: host.port, method: 'POST', path: '/stay', headers, setHost: false, agent: false },
        (response) => {
          response.on('error', () => undefined);
          response.once('data', () => held(() => asked.destroy()));
        },
      );
      asked.on('error', () => undefined);
      asked.end();
    });
  const wait = (ms: number) => new Promise((go) => setTimeout(go, ms));
  (await hold())();
  await wait(100);
  const letGo = await hold();
  await wait(700);
  expect(isClosed, 'a reload is no closing').toBe(false);
  letGo();
  await wait(700);
  expect(isClosed).toBe(true);
});
