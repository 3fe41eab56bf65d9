/** Headers against content that is not ours, and against storing what the API says. */
import { createHash } from 'node:crypto';
import type { RequestHandler } from 'express';
import helmet from 'helmet';

/** Hash of the empty style tag that the web client's style library starts from. */
const EMPTY_HASH = hashOf('');

/** Content-Security-Policy with the hashes of what stands inline in the page. */
export function securityHeaders(indexHtml: string): RequestHandler {
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        scriptSrc: ["'self'", ...inlineHashes(indexHtml, 'script')],
        styleSrc: ["'self'", EMPTY_HASH, ...inlineHashes(indexHtml, 'style')],
        imgSrc: ["'self'", 'data:'],
        fontSrc: ["'self'"],
        connectSrc: ["'self'"],
        objectSrc: ["'none'"],
        baseUri: ["'none'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
      },
    },
    xFrameOptions: { action: 'deny' },
    referrerPolicy: { policy: 'no-referrer' },
  });
}

/** Nothing that the API says may stay in a cache of browser or proxy. */
export const noStore: RequestHandler = (_request, response, next) => {
  response.setHeader('Cache-Control', 'no-store');
  next();
};

function inlineHashes(html: string, tag: 'script' | 'style'): string[] {
  const inline = new RegExp(`<${tag}(?![^>]*\\bsrc=)[^>]*>([\\s\\S]*?)</${tag}>`, 'gi');
  return [...html.matchAll(inline)].map(([, text]) => hashOf(text ?? ''));
}

function hashOf(text: string): string {
  return `'sha256-${createHash('sha256').update(text).digest('base64')}'`;
}
