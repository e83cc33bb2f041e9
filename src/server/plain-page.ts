/** A page that needs neither the database nor a script: for when one of them is the trouble. */
export function plainPage(page: {
  status: number;
  title: string;
  sentence: string;
  siteName: string;
  headers?: Readonly<Record<string, string>>;
}): Response {
  const html = `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="color-scheme" content="light dark">
<title>${escaped(page.title)} · ${escaped(page.siteName)}</title>
</head>
<body style="margin:0;font:16px/1.5 Barlow,sans-serif">
<main style="max-width:34rem;margin:18vh auto 0;padding:0 1.5rem">
<p>${escaped(page.siteName)}</p>
<h1 style="font-size:1.75rem;font-weight:500">${escaped(page.title)}</h1>
<p>${escaped(page.sentence)}</p>
<p><a href="/">To the Board</a></p>
</main>
</body>
</html>
`;
  return new Response(html, {
    status: page.status,
    headers: { 'Content-Type': 'text/html; charset=utf-8', 'Cache-Control': 'no-store', ...page.headers },
  });
}

const ENTITIES: Readonly<Record<string, string>> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };
const escaped = (text: string): string => text.replace(/[&<>"]/g, (character) => ENTITIES[character]!);
