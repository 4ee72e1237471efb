interface Attachment {
  /** Text goes out as UTF-8. */
  readonly bytes: Uint8Array<ArrayBuffer> | string;
  readonly fileName: string;
  readonly mediaType: string;
}

/** A file that the browser saves under its name, which may hold any character (RFC 6266). */
export function attachment({ bytes, fileName, mediaType }: Attachment): Response {
  const ascii = fileName.replace(/[^\x20-\x7e]|["\\%]/g, '_');
  return new Response(bytes, {
    headers: {
      'content-type': mediaType,
      'content-disposition': `attachment; filename="${ascii}"; filename*=UTF-8''${encodeURIComponent(fileName)}`,
      'cache-control': 'private, no-store',
    },
  });
}
