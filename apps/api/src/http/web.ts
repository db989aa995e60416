import express, { type RequestHandler } from 'express';
import { existsSync } from 'node:fs';
import { join, resolve, sep } from 'node:path';

const IMMUTABLE = /^\/(_expo\/static|assets)\//;

/** The exported client: a compressed sibling when the browser takes it, long life for hashed names, one page for every route. */
export function serveWeb(webDir: string): RequestHandler[] {
  const root = resolve(webDir);
  return [onePage, compressedSibling(root), statics(root)];
}

const statics = (root: string): RequestHandler =>
  express.static(root, {
    dotfiles: 'allow', // exported assets lie under a dotted folder
    index: 'index.html',
    redirect: false,
    setHeaders: (res, path) => {
      const served = path.slice(root.length).split(sep).join('/');
      res.setHeader(
        'Cache-Control',
        IMMUTABLE.test(served) ? 'public, max-age=31536000, immutable' : 'no-cache',
      );
    },
  });

function compressedSibling(root: string): RequestHandler {
  const known = new Set<string>(); // only what is there: addresses anybody makes up are not remembered
  const there = (path: string) => {
    if (known.has(path)) return true;
    const found = existsSync(join(root, path));
    if (found) known.add(path);
    return found;
  };
  return (req, res, next) => {
    const path = req.path === '/' ? '/index.html' : req.path;
    if (path.includes('..') || !/\.(js|css|html|json|svg|map|webmanifest)$/.test(path)) return next();
    const accepts = String(req.headers['accept-encoding'] ?? '');
    const ending = /\bbr\b/.test(accepts) ? '.br' : /\bgzip\b/.test(accepts) ? '.gz' : null;
    res.vary('Accept-Encoding');
    if (!ending || !there(path + ending)) return next();
    res.type(path.slice(path.lastIndexOf('.')));
    res.setHeader('Content-Encoding', ending === '.br' ? 'br' : 'gzip');
    res.setHeader('Cache-Control', IMMUTABLE.test(path) ? 'public, max-age=31536000, immutable' : 'no-cache');
    res.sendFile(path + ending, {
      root,
      dotfiles: 'allow',
      cacheControl: false,
      headers: { 'Content-Type': res.get('Content-Type') },
    });
  };
}

/** A path without an ending is a screen's address: the client finds its way. A missing file stays missing. */
const onePage: RequestHandler = (req, _res, next) => {
  const last = req.path.slice(req.path.lastIndexOf('/') + 1);
  if (req.method === 'GET' && !last.includes('.')) req.url = '/index.html';
  next();
};
