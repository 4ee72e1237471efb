import { describe, expect, it } from 'vitest';
import { fieldsOfForm, readBody, readBounded } from '@/lib/http/body';

const ADDRESS = 'http://understave.test/';

function post(body: BodyInit, headers: Record<string, string> = {}): Request {
  return new Request(ADDRESS, { method: 'POST', body, headers, duplex: 'half' } as RequestInit);
}

/** A body without a Content-Length, as a chunked request has none. */
function chunked(...chunks: readonly Uint8Array[]): Request {
  return post(new ReadableStream({
    start(controller) {
      for (const chunk of chunks) controller.enqueue(chunk);
      controller.close();
    },
  }));
}

describe('readBounded', () => {
  it('gives the bytes up to the bound', async () => {
    const read = await readBounded(chunked(new Uint8Array([1, 2]), new Uint8Array([3])), 3);
    expect(read).toEqual({ ok: true, value: new Uint8Array([1, 2, 3]) });
  });

  it('stops past the bound, whatever the length said', async () => {
    const read = await readBounded(chunked(new Uint8Array(2), new Uint8Array(2)), 3);
    expect(read).toMatchObject({ ok: false, error: { code: 'too_large' } });
  });

  it('does not begin when the length says more', async () => {
    const read = await readBounded(post('long', { 'content-length': '4' }), 3);
    expect(read).toMatchObject({ ok: false, error: { code: 'too_large' } });
  });
});

describe('readBody as JSON', () => {
  const json = { 'content-type': 'application/json' };

  it('gives the object', async () => {
    expect(await readBody(post('{"a":1}', json), 'json', 100)).toEqual({ ok: true, value: { a: 1 } });
  });

  it.each(['', '{', '[1]', '"a"', 'null'])('refuses %j', async (text) => {
    expect(await readBody(post(text, json), 'json', 100)).toMatchObject({ ok: false, error: { code: 'bad_input' } });
  });

  it('refuses what a plain form of another site could send', async () => {
    const disguised = post('{"a":1}', { 'content-type': 'text/plain' });
    expect(await readBody(disguised, 'json', 100)).toMatchObject({ ok: false, error: { code: 'bad_input' } });
  });
});

describe('readBody as a form', () => {
  it('gives fields and files', async () => {
    const form = new FormData();
    form.set('title', 'Prelude');
    form.set('file', new File(['abc'], 'a.mxl'));
    const read = await readBody(post(form), 'form', 10_000);
    if (!read.ok) throw new Error(read.error.code);
    expect(read.value['title']).toBe('Prelude');
    expect(read.value['file']).toBeInstanceOf(File);
  });

  it('refuses a broken one', async () => {
    const broken = post('--x', { 'content-type': 'multipart/form-data; boundary=y' });
    expect(await readBody(broken, 'form', 100)).toMatchObject({ ok: false, error: { code: 'bad_input' } });
  });
});

describe('fieldsOfForm', () => {
  it('makes a list of a name that comes several times, and leaves out what the framework adds', () => {
    const form = new FormData();
    form.append('span', '0');
    form.append('span', '4');
    form.append('title', 'A');
    form.append('$ACTION_ID_x', '');
    expect(fieldsOfForm(form)).toEqual({ span: ['0', '4'], title: 'A' });
  });
});
