import type { Page } from '@playwright/test';

interface Answer {
  readonly status: number;
  readonly body: unknown;
}

/** A call of the API from within the page, with its cookies and its CSRF token: what the signed-in person may do. */
export async function callApi(page: Page, method: string, path: string, body?: unknown): Promise<Answer> {
  return page.evaluate(
    async ({ method, path, body }) => {
      const token = /(?:^|; )XSRF-TOKEN=([^;]*)/.exec(document.cookie)?.[1] ?? '';
      const headers: Record<string, string> = { 'X-XSRF-TOKEN': decodeURIComponent(token) };
      if (body !== undefined) headers['Content-Type'] = 'application/json';
      const answer = await fetch(path, {
        method,
        headers,
        body: body === undefined ? null : JSON.stringify(body),
      });
      const text = await answer.text();
      return { status: answer.status, body: text ? (JSON.parse(text) as unknown) : null };
    },
    { method, path, body },
  );
}
