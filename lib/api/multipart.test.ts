import { describe, expect, it } from 'vitest';
import { ApiError } from './error';
import { baseName, readBody, splitMultipart } from './multipart';

async function form(parts: [string, string | File][]): Promise<{ body: Uint8Array; type: string }> {
  const data = new FormData();
  for (const [name, value] of parts) data.append(name, value);
  const request = new Request('http://x.example', { method: 'POST', body: data });
  return { type: request.headers.get('content-type') ?? '', body: new Uint8Array(await request.arrayBuffer()) };
}

describe('an upload', () => {
  it('gives back every file byte for byte, and the fields beside them', async () => {
    const bytes = new Uint8Array([13, 10, 45, 45, 0, 255, 13, 10]);
    const { body, type } = await form([
      ['name', 'Portal sheds, set 4'],
      ['files', new File([bytes], 'Nodes.csv')],
      ['files', new File([], 'Members.csv')],
    ]);
    const sent = splitMultipart(body, type);
    expect(sent.fields).toEqual({ name: 'Portal sheds, set 4' });
    expect(sent.files.map((file) => file.name)).toEqual(['Nodes.csv', 'Members.csv']);
    expect([...(sent.files[0]?.bytes ?? [])]).toEqual([...bytes]);
    expect(sent.files[1]?.bytes.length).toBe(0);
  });

  it('is refused when cut short or not a form', async () => {
    const { body, type } = await form([['files', new File(['frame;node'], 'Nodes.csv')]]);
    expect(() => splitMultipart(body.subarray(0, body.length - 20), type)).toThrow(ApiError);
    expect(() => splitMultipart(body, 'multipart/form-data')).toThrow(ApiError);
    expect(() => splitMultipart(new Uint8Array(0), type)).toThrow(ApiError);
  });

  it('keeps no path of the sender’s machine', () => {
    expect(baseName('C:\\jobs\\frames.xlsx')).toBe('frames.xlsx');
    expect(baseName('../../frames.xlsx')).toBe('frames.xlsx');
    expect(baseName('frames\r\n.xlsx')).toBe('frames.xlsx');
  });

  it('is given up at the limit, without reading the rest', async () => {
    let pulled = 0;
    const endless = new ReadableStream<Uint8Array>({
      pull(controller) {
        pulled += 1;
        controller.enqueue(new Uint8Array(1024));
      },
    });
    await expect(readBody(endless, 10 * 1024)).rejects.toMatchObject({ code: 'too-large' });
    expect(pulled).toBeLessThan(15);
  });
});
