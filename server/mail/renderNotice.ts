import { publicUrl } from '../config/runtime.ts';
import { unsubscribePath } from './unsubscribeToken.ts';

/** The words of a notice: plain paragraphs, figures in rows, at most one link that shows a page. */
export interface NoticeContent {
  readonly subject: string;
  readonly paragraphs: readonly string[];
  readonly rows?: readonly (readonly [label: string, value: string])[];
  readonly action?: { readonly label: string; readonly path: string };
}

const entities: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };

function escape(text: string): string {
  return text.replace(/[&<>"]/g, (mark) => entities[mark] ?? mark);
}

/** Text and HTML of one notice for one person. Kinds that may be turned off carry RFC 8058 headers. */
export function renderNotice(notice: {
  greeting: string;
  from: string;
  content: NoticeContent;
  unsubscribe?: { membershipId: string; kind: string };
}): { text: string; html: string; headers: Record<string, string> } {
  const { content } = notice;
  const link = content.action ? `${publicUrl()}${content.action.path}` : undefined;
  const off = notice.unsubscribe
    ? `${publicUrl()}${unsubscribePath(notice.unsubscribe.membershipId, notice.unsubscribe.kind)}`
    : undefined;
  const offApi = off?.replace('/unsubscribe/', '/api/v1/unsubscribe/');
  const text = [
    `Hello ${notice.greeting},`,
    ...content.paragraphs,
    ...(content.rows
      ? [content.rows.map(([label, value]) => `${label}: ${value}`).join('\n')]
      : []),
    ...(content.action && link ? [`${content.action.label}: ${link}`] : []),
    `${notice.from}`,
    ...(off ? [`Turn off notices of this kind: ${off}`] : []),
  ].join('\n\n');
  const rows = content.rows
    ?.map(
      ([label, value]) =>
        `<tr><td style="padding:2px 24px 2px 0;color:#5A645D">${escape(label)}</td><td style="text-align:right">${escape(value)}</td></tr>`,
    )
    .join('');
  const html = `<!doctype html><html lang="en"><head><meta charset="utf-8"><title>${escape(content.subject)}</title></head>
<body style="margin:0;background:#F4F1EA;color:#1F2A24;font:16px/1.5 sans-serif"><div style="max-width:36em;margin:0 auto;padding:24px">
<p>Hello ${escape(notice.greeting)},</p>
${content.paragraphs.map((paragraph) => `<p>${escape(paragraph)}</p>`).join('\n')}
${rows ? `<table style="border-collapse:collapse">${rows}</table>` : ''}
${content.action && link ? `<p><a href="${escape(link)}" style="color:#7A2E46">${escape(content.action.label)}</a></p>` : ''}
<p>${escape(notice.from)}</p>
${off ? `<p style="font-size:13px;color:#5A645D"><a href="${escape(off)}" style="color:#5A645D">Turn off notices of this kind</a></p>` : ''}
</div></body></html>`;
  return {
    text,
    html,
    headers: offApi
      ? { 'List-Unsubscribe': `<${offApi}>`, 'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click' }
      : {},
  };
}
