// Text of a sheet made safe for the places where the record puts it.
//
// Every text of a sheet file is hostile until it has passed one of these.

const entities: Readonly<Record<string, string>> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };

/** C0 controls and halves of characters. */
const unfit = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f\p{Surrogate}]/gu;

/** For element content and quoted attributes. What no document may hold becomes U+FFFD. */
export function escapeHtml(text: string): string {
  return text.replace(unfit, '\ufffd').replace(/[&<>"']/gu, (sign) => entities[sign] ?? sign);
}

/** A CSS string, quotes included; everything but letters, digits and spaces is written as a code point. */
export function cssString(text: string): string {
  const safe = text
    .replace(unfit, '\ufffd')
    .replace(/[^\p{L}\p{N} ]/gu, (sign) => `\\${(sign.codePointAt(0) ?? 0xfffd).toString(16)} `);
  return `"${safe}"`;
}

/** A picture that may be shown: PNG, JPEG or nothing; the data are letters of base64 only. */
export function safeImage(url: string): string | undefined {
  return /^data:image\/(?:png|jpeg);base64,[A-Za-z0-9+/]+={0,2}$/u.test(url) ? url : undefined;
}
