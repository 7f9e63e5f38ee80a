/**
 * Text as the open DXF ASCII format takes it: printable ASCII only, everything else as \U+XXXX, and nothing a reader
 * would take for a code of its own (backslash, caret, a double percent sign).
 */

const FRACTIONS: Readonly<Record<string, string>> = {
  "\u00bc": "1/4", "\u00bd": "1/2", "\u00be": "3/4", "\u215b": "1/8", "\u215c": "3/8", "\u215d": "5/8", "\u215e": "7/8",
};

/** A text value of a TEXT entity. Fractions become plain `1/2`; line breaks and tabs become spaces. */
export function dxfText(text: string): string {
  const plain = text
    .replace(/(\d?)([\u00bc-\u00be\u215b-\u215e])/g, (_, digit: string, sign: string) => `${digit === "" ? "" : `${digit} `}${FRACTIONS[sign] ?? sign}`)
    .replace(/\u2044/g, "/")
    .replace(/[\s\u0000-\u001f\u007f]/g, " ");
  return plain.replace(/[^ -~]|[\\^]|%(?=%)|(?<=%)%/g, escapeUnit);
}

/** UTF-16 units, since the escape holds four digits: a character beyond them becomes two. */
function escapeUnit(found: string): string {
  return [...Array(found.length).keys()].map((at) => `\\U+${found.charCodeAt(at).toString(16).toUpperCase().padStart(4, "0")}`).join("");
}

/** A number with at most six decimals and no exponent, as every reader takes it. */
export function dxfNumber(value: number): string {
  const text = value.toFixed(6).replace(/0+$/, "").replace(/\.$/, ".0");
  return text === "-0.0" ? "0.0" : text;
}
