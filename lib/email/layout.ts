/** The parts of one letter: paragraphs, one link, and a last word about what to do if it came by mistake. */
export type Letter = { greeting: string; paragraphs: readonly string[]; link: { label: string; url: string }; closing: string };

export function letterText(letter: Letter): string {
  return [letter.greeting, ...letter.paragraphs, `${letter.link.label}:\n${letter.link.url}`, letter.closing, "Saddlemark"].join("\n\n") + "\n";
}

// The mark in mail's own means: table cells and borders draw where SVG and web fonts do not.
const mark =
  '<table role="presentation" cellspacing="0" cellpadding="0"><tr>' +
  '<td style="font-size:20px;color:#A9743B">)</td><td style="font-size:12px;color:#B5481A">&#9650;</td><td style="font-size:20px;color:#A9743B">(</td>' +
  '<td style="padding-left:10px;font-weight:bold;font-size:18px;color:#1D2B2C">Saddlemark</td></tr></table>';

export function letterHtml(letter: Letter): string {
  const paragraphs = [letter.greeting, ...letter.paragraphs].map((text) => `<p>${escapeHtml(text)}</p>`).join("\n");
  const url = escapeHtml(letter.link.url);
  return `<!doctype html>
<html lang="en"><body style="margin:0;padding:24px;background:#F7F4EA;color:#1D2B2C;font-family:sans-serif;font-size:16px;line-height:1.5">
${mark}
${paragraphs}
<p><a href="${url}" style="color:#B5481A">${escapeHtml(letter.link.label)}</a></p>
<p style="font-size:14px;word-break:break-all">${url}</p>
<p style="font-size:14px;color:#5B6766">${escapeHtml(letter.closing)}</p>
</body></html>
`;
}

export function escapeHtml(text: string): string {
  return text.replaceAll("&", "&amp;").replaceAll("<", "&lt;").replaceAll(">", "&gt;").replaceAll('"', "&quot;").replaceAll("'", "&#39;");
}
