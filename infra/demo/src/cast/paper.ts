/** Invented papers: a PDF of one page with a few lines, written out by hand (ISO 32000-1, section 7.5). */

/** Only plain letters: the page uses a standard font in its standard encoding. */
export function paperOf(lines: readonly string[]): Uint8Array {
  const words = lines.map((line) => `(${line.replace(/[^\x20-\x7e]/g, '?').replace(/([\\()])/g, '\\$1')}) Tj T*`);
  const stream = `BT /F1 12 Tf 18 TL 72 760 Td ${words.join('\n')} ET`;
  const objects = [
    '<< /Type /Catalog /Pages 2 0 R >>',
    '<< /Type /Pages /Kids [3 0 R] /Count 1 >>',
    '<< /Type /Page /Parent 2 0 R /MediaBox [0 0 595 842] /Contents 4 0 R /Resources << /Font << /F1 5 0 R >> >> >>',
    `<< /Length ${stream.length} >>\nstream\n${stream}\nendstream`,
    '<< /Type /Font /Subtype /Type1 /BaseFont /Helvetica >>',
  ];
  let text = '%PDF-1.4\n';
  const offsets = objects.map((object, index) => {
    const offset = text.length;
    text += `${index + 1} 0 obj\n${object}\nendobj\n`;
    return `${String(offset).padStart(10, '0')} 00000 n \n`;
  });
  const size = objects.length + 1;
  const table = `xref\n0 ${size}\n0000000000 65535 f \n${offsets.join('')}`;
  return new TextEncoder().encode(
    `${text}${table}trailer\n<< /Size ${size} /Root 1 0 R >>\nstartxref\n${text.length}\n%%EOF\n`,
  );
}
