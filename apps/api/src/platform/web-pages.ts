import { readFileSync, statSync } from 'node:fs';
import { basename, extname, join } from 'node:path';
import express, { Router } from 'express';
import { nonceOf } from './content-policy';

const noncePlaceholder = '__CSP_NONCE__';
/** The build puts a hash of the content into these names, so they never change. */
const hashedName = /[-.][A-Za-z0-9_-]{8,}\.(?:js|css|woff2?|svg|png|jpg|webp)$/;

/**
 * Serves the built web app: hashed files to be kept for a year, and for every address of the app the index page with a
 * fresh nonce, never to be kept.
 *
 * @param folder where the web build lies; it may be built (again) while the server runs
 */
export function webPages(folder: string): Router {
  const router = Router();
  const index = indexPage(join(folder, 'index.html'));
  router.use(
    express.static(folder, {
      index: false,
      redirect: false,
      setHeaders: (res, path) => {
        const lasting = hashedName.test(basename(path));
        res.setHeader('Cache-Control', lasting ? 'public, max-age=31536000, immutable' : 'no-cache');
      },
    }),
  );
  router.use((req, res, next) => {
    const isPage =
      (req.method === 'GET' || req.method === 'HEAD') && extname(req.path) in { '': 1, '.html': 1 };
    if (!isPage) {
      next();
      return;
    }
    const page = index();
    if (page === null) {
      res.status(503).type('text/plain').send('The web app is not built yet: run npm run build.');
      return;
    }
    res.setHeader('Cache-Control', 'no-store');
    res.type('html').send(page.replaceAll(noncePlaceholder, nonceOf(res)));
  });
  router.use((_req, res) => {
    res.status(404).type('text/plain').send('There is no such file.');
  });
  return router;
}

/** Reads the index page anew only when the file changed; null while there is none. */
function indexPage(path: string): () => string | null {
  let kept: { changed: number; text: string } | null = null;
  return () => {
    const changed = statSync(path, { throwIfNoEntry: false })?.mtimeMs;
    if (changed === undefined) return null;
    if (kept?.changed !== changed) kept = { changed, text: readFileSync(path, 'utf8') };
    return kept.text;
  };
}
