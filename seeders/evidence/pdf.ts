const PAGE = { width: 595, height: 842 } as const;
const LINE_HEIGHT = 22;

/** Letters a built-in face of a PDF writes in one byte; brackets and backslashes are escaped. */
const written = (text: string): string => text.replace(/[()\\]/gu, (sign) => `\\${sign}`);

/** A PDF of one page with a few lines of text in a built-in face, the first one larger. Latin letters only. */
export function pdfPage(lines: readonly string[]): Buffer {
  const text = lines.map((line, place) => {
    const size = place === 0 ? 20 : 12;
    return `BT /F1 ${size} Tf 70 ${PAGE.height - 90 - place * LINE_HEIGHT} Td (${written(line)}) Tj ET`;
  });
  const content = text.join("\n");
  const objects = [
    "<< /Type /Catalog /Pages 2 0 R >>",
    "<< /Type /Pages /Kids [3 0 R] /Count 1 >>",
    `<< /Type /Page /Parent 2 0 R /MediaBox [0 0 ${PAGE.width} ${PAGE.height}] /Contents 4 0 R /Resources << /Font << /F1 5 0 R >> >> >>`,
    `<< /Length ${Buffer.byteLength(content, "latin1")} >>\nstream\n${content}\nendstream`,
    "<< /Type /Font /Subtype /Type1 /BaseFont /Helvetica /Encoding /WinAnsiEncoding >>",
  ];
  let body = "%PDF-1.4\n";
  const offsets = objects.map((object, place) => {
    const offset = Buffer.byteLength(body, "latin1");
    body += `${place + 1} 0 obj\n${object}\nendobj\n`;
    return offset;
  });
  const table = offsets.map((offset) => `${String(offset).padStart(10, "0")} 00000 n \n`).join("");
  const start = Buffer.byteLength(body, "latin1");
  const trailer = `xref\n0 ${objects.length + 1}\n0000000000 65535 f \n${table}trailer\n<< /Size ${objects.length + 1} /Root 1 0 R >>\nstartxref\n${start}\n%%EOF\n`;
  return Buffer.from(body + trailer, "latin1");
}
