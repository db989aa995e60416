import { build } from 'esbuild';
import { once } from 'node:events';
import { createServer, type Server } from 'node:http';
import { brotliCompressSync } from 'node:zlib';
import { at } from '../../scripts/lib/paths.mjs';

const HELLO = `
  import { AppRegistry, Text, View } from 'react-native-web';
  const Hello = () => <View><Text>Hello</Text></View>;
  AppRegistry.registerComponent('hello', () => Hello);
  AppRegistry.runApplication('hello', { rootTag: document.getElementById('root') });`;
const PAGE =
  '<!doctype html><html lang="en"><head><meta charset="utf-8"><title>Hello</title></head><body><div id="root"></div><script src="/hello.js" defer></script></body></html>';

/** Words alone: the least a browser can be asked to paint. */
const STATIC_PAGE =
  '<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width"><title>Hello</title></head><body><p>Hello</p></body></html>';

export type HelloPage = { url: string; stop: () => void };

/** The least page react-native-web can paint, served compressed: what a first paint is held against. */
export async function openHelloPage(): Promise<HelloPage> {
  const bundled = await build({
    stdin: { contents: HELLO, loader: 'tsx', resolveDir: at('apps', 'mobile') },
    bundle: true,
    minify: true,
    write: false,
    format: 'iife',
    jsx: 'automatic',
    define: { 'process.env.NODE_ENV': '"production"' },
    logLevel: 'silent',
  });
  const script = brotliCompressSync(bundled.outputFiles[0]?.contents ?? new Uint8Array());
  const page = brotliCompressSync(PAGE);
  const plain = brotliCompressSync(STATIC_PAGE);
  const server = createServer((req, res) => {
    const asked = req.url === '/hello.js';
    res.writeHead(200, {
      'Content-Type': asked ? 'text/javascript' : 'text/html',
      'Content-Encoding': 'br',
    });
    res.end(asked ? script : req.url === '/static' ? plain : page);
  });
  server.listen(0, '127.0.0.1');
  await once(server, 'listening');
  return { url: `http://127.0.0.1:${portOf(server)}/`, stop: () => void server.close() };
}

export function portOf(server: Server): number {
  const address = server.address();
  if (address === null || typeof address === 'string') throw new Error('The server has no port');
  return address.port;
}
