import { ProblemError } from '@steepfall/shared/problems';
import { fileTypeFromBuffer } from 'file-type';
import sharp from 'sharp';

/** A picture that is fit to keep: upright, of a size that a screen shows, without anything that the camera wrote into it. */
export interface Picture {
  mediaType: 'image/jpeg';
  bytes: Buffer;
  widthPx: number;
  heightPx: number;
}

/** Long enough to read the small print of a label. */
const LONGEST_SIDE_PX = 1600;
/** A small file can unfold into gigabytes: above this it is not unfolded. Cameras of telephones stay below. */
const MOST_PIXELS = 80_000_000;
const DECODE_WITHIN_S = 15;
const QUALITY = 82;

const mediaTypes = ['image/jpeg', 'image/png', 'image/webp'];
const CHOOSE = 'Choose a JPEG, PNG or WebP picture.';

/** Decodes what was sent and writes it anew. What it is, is told by its content; name and label of a file prove nothing. */
export async function readPicture(sent: Buffer, pointer: string): Promise<Picture> {
  const refuse = (detail: string) =>
    new ProblemError('not-valid', 'The photo was not kept.', { errors: [{ pointer, detail }] });
  const type = await fileTypeFromBuffer(sent);
  if (!type) throw refuse(`This file is not a picture. ${CHOOSE}`);
  if (!mediaTypes.includes(type.mime)) throw refuse(`This is a file of the type ${type.mime}. ${CHOOSE}`);
  const isBroken = () => refuse(`This picture cannot be read: the file is broken. ${CHOOSE}`);
  // The head alone: nothing is unfolded yet.
  const { width, height } = await sharp(sent, { limitInputPixels: false })
    .metadata()
    .catch(() => {
      throw isBroken();
    });
  if (width * height > MOST_PIXELS)
    throw refuse(`This picture has ${width} x ${height} dots, which is too many: make it smaller, then send it again.`);
  try {
    const { data, info } = await sharp(sent, { limitInputPixels: MOST_PIXELS, failOn: 'error' })
      .autoOrient()
      .resize({ width: LONGEST_SIDE_PX, height: LONGEST_SIDE_PX, fit: 'inside', withoutEnlargement: true })
      .flatten({ background: '#ffffff' })
      .jpeg({ quality: QUALITY })
      .timeout({ seconds: DECODE_WITHIN_S })
      .toBuffer({ resolveWithObject: true });
    return { mediaType: 'image/jpeg', bytes: data, widthPx: info.width, heightPx: info.height };
  } catch {
    throw isBroken();
  }
}
