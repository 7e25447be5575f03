/** One layout for every mail: a line of who it is from, plain paragraphs, at most one button, and a foot. */

export interface MailBody {
  greeting: string;
  paragraphs: string[];
  button?: { label: string; url: string };
  foot?: string;
}

function escapeHtml(text: string): string {
  return text.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/>/g, '&gt;').replace(/"/g, '&quot;');
}

/** The plain-text and HTML parts of one mail. Everything given is escaped. */
export function renderMail(body: MailBody): { text: string; html: string } {
  const foot = body.foot ?? 'Sent by Hilum for your seed dealership.';
  const text = [
    body.greeting,
    ...body.paragraphs,
    ...(body.button ? [`${body.button.label}:\n${body.button.url}`] : []),
    `-- \n${foot}`,
  ].join('\n\n');
  const paragraphs = [body.greeting, ...body.paragraphs]
    .map((one) => `<p style="margin:0 0 14px">${escapeHtml(one)}</p>`)
    .join('');
  const button = body.button
    ? `<p style="margin:22px 0"><a href="${escapeHtml(body.button.url)}" style="background:#5b3a86;color:#ffffff;padding:11px 18px;text-decoration:none;font-weight:600">${escapeHtml(body.button.label)}</a></p><p style="margin:0 0 14px;color:#6a6055;font-size:13px">${escapeHtml(body.button.url)}</p>`
    : '';
  const html = `<!doctype html><html lang="en"><body style="margin:0;background:#f4efe2;color:#221d17;font-family:'Public Sans',Helvetica,Arial,sans-serif;font-size:15px;line-height:1.5"><div style="background:#1a1613;color:#fbf8f0;padding:14px 24px;font-weight:700;font-size:18px">Hilum</div><div style="max-width:560px;padding:24px">${paragraphs}${button}<p style="margin:26px 0 0;padding-top:12px;border-top:1px solid #d9cfb9;color:#6a6055;font-size:13px">${escapeHtml(foot)}</p></div></body></html>`;
  return { text, html };
}
