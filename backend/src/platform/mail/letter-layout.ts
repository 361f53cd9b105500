/** What a letter says, from which its plain text and its HTML are both made. */
export interface LetterContent {
  readonly groupName: string;
  readonly heading: string;
  /** Paragraphs before the facts. */
  readonly opening: readonly string[];
  /** Facts in a table: what, and how much or when. The last one stands out where it is marked. */
  readonly facts: readonly {
    readonly label: string;
    readonly value: string;
    readonly isStrong?: true;
  }[];
  readonly link: { readonly label: string; readonly url: string } | null;
  /** Paragraphs after the link, in the quiet colour. */
  readonly closing: readonly string[];
}

const ink = '#0F272D';
const quiet = '#526266';
const deep = '#0A5465';
const hair = '#CBD6D8';
const foam = '#F5F9F8';
const font = "font-family:'Work Sans',Verdana,sans-serif";

/** The plain-text twin of a letter. */
export function letterText(content: LetterContent): string {
  const width = Math.max(0, ...content.facts.map(({ label }) => label.length)) + 2;
  const parts = [
    content.heading,
    ...content.opening,
    content.facts.map(({ label, value }) => `${`${label}:`.padEnd(width)}${value}`).join('\n'),
    content.link === null ? '' : `${content.link.label}:\n${content.link.url}`,
    ...content.closing,
  ];
  return `${parts.filter((part) => part !== '').join('\n\n')}\n`;
}

/** A letter as one table of 600 px with literal colours, as mail programs want it. */
export function letterHtml(content: LetterContent): string {
  const paragraph = (text: string, colour: string): string =>
    `<p style="margin:0 0 12px;font-size:16px;line-height:24px;color:${colour}">${escapeHtml(text)}</p>`;
  const fact = ({ label, value, isStrong }: LetterContent['facts'][number]): string => {
    const weight = isStrong === true ? 'font-weight:600;' : '';
    return `<tr>
<td style="padding:6px 12px 6px 0;border-bottom:1px solid ${hair};font-size:15px;color:${quiet};${weight}">${escapeHtml(label)}</td>
<td align="right" style="padding:6px 0;border-bottom:1px solid ${hair};font-size:15px;color:${ink};${weight}">${escapeHtml(value)}</td>
</tr>`;
  };
  const link =
    content.link === null
      ? ''
      : `<p style="margin:20px 0"><a href="${escapeHtml(content.link.url)}" style="display:inline-block;padding:12px 20px;background:${deep};color:#FFFFFF;font-size:16px;font-weight:600;text-decoration:none;border-radius:3px">${escapeHtml(content.link.label)}</a></p>`;
  return `<!doctype html>
<html lang="en-GB"><head><meta charset="utf-8"><title>${escapeHtml(content.heading)}</title></head>
<body style="margin:0;padding:0;background:${foam};${font}">
<table role="presentation" width="100%" cellpadding="0" cellspacing="0"><tr><td align="center" style="padding:24px 12px">
<table role="presentation" width="600" cellpadding="0" cellspacing="0" style="width:600px;max-width:100%;background:#FFFFFF;${font}"><tr><td style="padding:28px">
<p style="margin:0 0 20px;font-size:14px;color:${quiet}">${escapeHtml(content.groupName)}</p>
<h1 style="margin:0 0 16px;font-size:24px;line-height:30px;font-weight:600;color:${ink}">${escapeHtml(content.heading)}</h1>
${content.opening.map((text) => paragraph(text, ink)).join('\n')}
<table role="presentation" width="100%" cellpadding="0" cellspacing="0" style="margin:8px 0 4px">${content.facts.map(fact).join('')}</table>
${link}
${content.closing.map((text) => paragraph(text, quiet)).join('\n')}
</td></tr></table>
</td></tr></table>
</body></html>
`;
}

function escapeHtml(text: string): string {
  return text
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;');
}
