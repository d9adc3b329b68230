import { QueryTypes } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import sharp from 'sharp';
import request from 'supertest';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { buildLot, signInAs, type SignedInMember } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { expectProblem } from '../../test/problem-matcher.js';

let testApp: TestApp;
let brewer: SignedInMember;
let path: string;
beforeAll(async () => {
  testApp = await createTestApp();
});
afterAll(() => testApp.close());
beforeEach(async () => {
  brewer = await signInAs(testApp, 'brewer');
  const { id } = await buildLot(testApp, brewer, { code: 'C-24' });
  path = `/api/stores/lots/${id}/photo`;
});

const label = (options: { width?: number; height?: number } = {}) =>
  sharp({ create: { width: 40, height: 20, channels: 3, background: '#2a7', ...options } });
const send = (bytes: Buffer, filename = 'label.jpg', who = brewer) =>
  request(testApp.url).post(path).set('authorization', who.bearer).attach('photo', bytes, filename);
/** Sends a photo whose size is not told before. */
const sendParts = (parts: () => Iterable<Uint8Array>) => {
  const boundary = 'b';
  const text = (words: string) => new TextEncoder().encode(words);
  const body = ReadableStream.from(
    (function* () {
      yield text(`--${boundary}\r\nContent-Disposition: form-data; name="photo"; filename="a.jpg"\r\n\r\n`);
      yield* parts();
      yield text(`\r\n--${boundary}--\r\n`);
    })(),
  );
  const headers = { authorization: brewer.bearer, 'content-type': `multipart/form-data; boundary=${boundary}` };
  return fetch(`${testApp.url}${path}`, { method: 'POST', headers, body, duplex: 'half' });
};
const get = (who = brewer) => request(testApp.url).get(path).set('authorization', who.bearer);
const detailOf = ({ body }: request.Response) => (body as { errors: { detail: string }[] }).errors[0]!.detail;
const keptCount = async () => {
  const [row] = await testApp.app
    .get(Sequelize)
    .query<{ count: number }>('SELECT COUNT(*) AS count FROM attachments WHERE house_id = ?', {
      type: QueryTypes.SELECT,
      replacements: [brewer.house.id],
    });
  return Number(row?.count);
};

describe('the photo of a label', () => {
  it('is written anew: upright, no larger than a screen shows, nothing of the camera in it', async () => {
    const sent = await label({ width: 3000, height: 1500 })
      .withExif({ IFD0: { Make: 'A camera', Copyright: 'somebody' } })
      .withMetadata({ orientation: 6 })
      .jpeg()
      .toBuffer();
    expect((await send(sent)).body).toMatchObject({ lots: [{ code: 'C-24', hasPhoto: true }] });
    const answer = await get();
    expect(answer.headers).toMatchObject({
      'content-type': 'image/jpeg',
      'content-disposition': 'inline; filename="label.jpg"',
      'x-content-type-options': 'nosniff',
      'cache-control': 'private, no-store',
    });
    const kept = await sharp(answer.body as Buffer).metadata();
    expect(kept).toMatchObject({ format: 'jpeg', width: 800, height: 1600 });
    expect([kept.exif, kept.icc, kept.orientation]).toEqual([undefined, undefined, undefined]);
  });

  it('may come as PNG or WebP under any name, and takes the place of the one before', async () => {
    await send(await label().png().toBuffer(), 'label.txt').expect(200);
    await send(await label().webp().toBuffer()).expect(200);
    expect(await keptCount()).toBe(1);
  });

  it('can be taken off again', async () => {
    expectProblem(await get(), 'not-found');
    await send(await label().jpeg().toBuffer());
    const gone = await request(testApp.url).delete(path).set('authorization', brewer.bearer);
    expect(gone.body).toMatchObject({ lots: [{ hasPhoto: false }] });
    expect(await keptCount()).toBe(0);
    expectProblem(await request(testApp.url).delete(path).set('authorization', brewer.bearer), 'not-found');
  });

  it('is refused when it is none, with the reason', async () => {
    const jpeg = await label({ width: 900, height: 900 }).jpeg().toBuffer();
    const svg = '<?xml version="1.0"?><svg xmlns="http://www.w3.org/2000/svg"><script>1</script></svg>';
    const huge = await label({ width: 9100, height: 9100 }).png({ compressionLevel: 9 }).toBuffer();
    const refused: [Buffer, string][] = [
      [Buffer.from('This is a text file.'), 'This file is not a picture.'],
      [Buffer.from(svg), 'application/xml'],
      [await label().gif().toBuffer(), 'image/gif'],
      [jpeg.subarray(0, jpeg.length / 2), 'the file is broken'],
      [jpeg.subarray(0, 20), 'the file is broken'],
      [huge, '9100 x 9100 dots'],
      [Buffer.alloc(0), 'Choose a picture.'],
    ];
    for (const [bytes, reason] of refused) {
      const response = await send(bytes);
      expectProblem(response, 'not-valid', ['/photo']);
      expect(detailOf(response)).toContain(reason);
    }
    expect(await keptCount()).toBe(0);
  });

  it('is refused when it is sent in another way', async () => {
    const post = () => request(testApp.url).post(path).set('authorization', brewer.bearer);
    expectProblem(await post().send({ photo: 'x' }), 'not-valid', ['/photo']);
    expectProblem(await post().attach('other', Buffer.from('x'), 'x.jpg'), 'not-valid', ['/photo']);
    expectProblem(await post().set('content-type', 'multipart/form-data').send('x'), 'not-valid', ['/photo']);
  });

  it('is refused when it is too large, whether its size is told before or not', async () => {
    const large = await send(Buffer.alloc(40_000_000, 1));
    expectProblem(large, 'too-large', ['/photo']);
    expect(detailOf(large)).toContain('At most 12 MB');
    const streamed = await sendParts(function* () {
      for (let part = 0; part < 20; part += 1) yield new Uint8Array(1_000_000);
    });
    expect([streamed.status, await streamed.json()]).toMatchObject([413, { errors: [{ pointer: '/photo' }] }]);
  });

  it('may be broken off half way: nothing is kept, and the next one goes through', async () => {
    const sending = sendParts(function* () {
      yield new Uint8Array(1_000_000);
      throw new Error('The network is gone.');
    });
    await expect(sending).rejects.toThrow('fetch failed');
    expect(await keptCount()).toBe(0);
    await send(await label().jpeg().toBuffer()).expect(200);
  });

  it('needs a right, and is of its house', async () => {
    const jpeg = await label().jpeg().toBuffer();
    await send(jpeg);
    const hand = await signInAs(testApp, 'hand', { house: brewer.house });
    expect((await get(hand)).status).toBe(200);
    expectProblem(await send(jpeg, 'label.jpg', hand), 'not-allowed');
    const stranger = await signInAs(testApp, 'owner');
    expect((await get(stranger)).status).toBe(404);
    expectProblem(await send(jpeg, 'label.jpg', stranger), 'not-found');
    expectProblem(await request(testApp.url).delete(path).set('authorization', stranger.bearer), 'not-found');
  });
});
