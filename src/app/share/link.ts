import { deflateSync, Inflate, strFromU8, strToU8 } from 'fflate';
import type { Sketch } from '../../sketch/types';
import { writeSketch } from '../../sketch/write';

/**
 * A sketch as the fragment of an address: `#sketch=1.LENGTH.SUM.DATA`. DATA is the file's JSON without blanks, deflated
 * (RFC 1951), in the base64 alphabet for addresses (RFC 4648, section 5, without padding); LENGTH counts its characters and
 * SUM is its Adler-32 (RFC 1950), both in base 36, so that a link that was cut or altered is told from a whole one.
 * A fragment stays in the browser: it is never part of what is sent to a server (RFC 3986, section 3.5).
 */
const MARK = '#sketch=';
const FORM = '1';

/** Larger than any sketch that could be opened; a small link may not fill the memory. */
const MOST_BYTES = 16 * 1024 * 1024;

/** Links beyond this length are cut or broken into lines by some mail programs (common practice) [characters]. */
export const LONG_LINK = 2000;

export type LinkFault =
  | { readonly code: 'form'; readonly found: string }
  | { readonly code: 'cut'; readonly found: number; readonly wanted: number }
  | { readonly code: 'damaged' }
  | { readonly code: 'too-large' };

export type FromLink =
  | { readonly ok: true; readonly text: string }
  | { readonly ok: false; readonly fault: LinkFault };

function adler32(text: string): number {
  let [a, b] = [1, 0];
  for (let k = 0; k < text.length; k += 1) {
    a = (a + text.charCodeAt(k)) % 65521;
    b = (b + a) % 65521;
  }
  return b * 65536 + a;
}

function toBase64Url(bytes: Uint8Array): string {
  let binary = '';
  for (const byte of bytes) binary += String.fromCharCode(byte);
  return btoa(binary).replaceAll('+', '-').replaceAll('/', '_').replace(/=+$/, '');
}

const fromBase64Url = (text: string): Uint8Array =>
  Uint8Array.from(atob(text.replaceAll('-', '+').replaceAll('_', '/')), (c) => c.charCodeAt(0));

/** The fragment that holds a whole sketch, with its `#`. */
export function linkOf(sketch: Sketch): string {
  const json = JSON.stringify(JSON.parse(writeSketch(sketch)));
  const data = toBase64Url(deflateSync(strToU8(json), { level: 9 }));
  return `${MARK}${[FORM, data.length.toString(36), adler32(data).toString(36), data].join('.')}`;
}

/** The text of the sketch in a fragment, or why there is none. Never throws on any text. */
export function readLink(hash: string): FromLink {
  const refuse = (fault: LinkFault): FromLink => ({ ok: false, fault });
  const body = hash.slice(MARK.length);
  const [form = '', length = '', sum = '', ...rest] = body.split('.');
  if (form !== FORM && /^\d{1,4}$/.test(form)) return refuse({ code: 'form', found: form });
  const wanted = /^[0-9a-z]{1,6}$/.test(length) ? Number.parseInt(length, 36) : Number.NaN;
  const data = rest.join('.');
  if (form !== FORM || Number.isNaN(wanted)) return refuse({ code: 'damaged' });
  if (data.length < wanted) return refuse({ code: 'cut', found: data.length, wanted });
  if (!/^[\w-]*$/.test(data) || data.length > wanted || adler32(data).toString(36) !== sum)
    return refuse({ code: 'damaged' });
  return inflated(data);
}

/** Made larger piece by piece, and given up once it is beyond all bounds. */
function inflated(data: string): FromLink {
  const pieces: Uint8Array[] = [];
  let size = 0;
  const inflate = new Inflate((piece) => {
    size += piece.length;
    if (size <= MOST_BYTES) pieces.push(piece);
  });
  try {
    const bytes = fromBase64Url(data);
    for (let at = 0; at < bytes.length && size <= MOST_BYTES; at += 4096)
      inflate.push(bytes.subarray(at, at + 4096), at + 4096 >= bytes.length);
  } catch (error) {
    // fflate and atob tell of bad data by throwing; the sum was right, so that such a link was made so.
    if (error instanceof Error) return { ok: false, fault: { code: 'damaged' } };
    throw error;
  }
  if (size > MOST_BYTES) return { ok: false, fault: { code: 'too-large' } };
  const whole = new Uint8Array(size);
  let at = 0;
  for (const piece of pieces) {
    whole.set(piece, at);
    at += piece.length;
  }
  return { ok: true, text: strFromU8(whole) };
}

/** Why a link was not opened and what to do, in one sentence. */
export function sayLinkFault(fault: LinkFault): string {
  switch (fault.code) {
    case 'form':
      return `The link was made by a later version of Splitwright (its form is ${fault.found}); open it with that version.`;
    case 'cut':
      return `The link was cut on its way: ${fault.found} of ${fault.wanted} characters arrived. Ask for it again, or for the sketch as a file.`;
    case 'damaged':
      return 'The link was altered on its way and cannot be read. Ask for it again, or for the sketch as a file.';
    case 'too-large':
      return 'The link holds more than any sketch can; it was not made here.';
  }
}
