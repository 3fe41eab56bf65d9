/** What a handler answers. The frame turns it into an HTTP response. */
import { etagOf } from '@/server/http/etag';

export interface Reply {
  status: number;
  /** Sent as JSON. */
  body?: unknown;
  /** Sent as they are, in place of a JSON body. */
  bytes?: Buffer;
  headers?: Record<string, string>;
}

/** 200 with a JSON body; `version` adds the ETag that a later change must name. */
export function json(body: unknown, { version }: { version?: number } = {}): Reply {
  return { status: 200, body, headers: version === undefined ? {} : { ETag: etagOf(version) } };
}

/** 201 with the new thing and its address. */
export function created(body: unknown, { location, version }: { location: string; version?: number }): Reply {
  const etag: Record<string, string> = version === undefined ? {} : { ETag: etagOf(version) };
  return { status: 201, body, headers: { Location: location, ...etag } };
}

export function noContent(): Reply {
  return { status: 204 };
}

export interface FileReply {
  bytes: Buffer;
  contentType: string;
  fileName: string;
  /** `inline` shows it in the browser; the default saves it. */
  disposition?: 'attachment' | 'inline';
}

export function file({ bytes, contentType, fileName, disposition = 'attachment' }: FileReply): Reply {
  const ascii = fileName.replace(/[^\w .()-]/g, '_');
  const exact = encodeURIComponent(fileName).replace(
    /['()*]/g,
    (sign) => `%${sign.charCodeAt(0).toString(16)}`,
  );
  return {
    status: 200,
    bytes,
    headers: {
      'Content-Type': contentType,
      'Content-Disposition': `${disposition}; filename="${ascii}"; filename*=UTF-8''${exact}`,
    },
  };
}
