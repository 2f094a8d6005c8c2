import { HttpClient, HttpErrorResponse, type HttpResponse } from '@angular/common/http';
import { DOCUMENT, inject, Injectable } from '@angular/core';
import type { Endpoint } from '@stillstroke/contract/endpoint';
import { catchError, from, map, switchMap, throwError, type Observable } from 'rxjs';
import { endpointUrl, type PathParams, type QueryValues } from './endpoint-url';

interface DownloadInput {
  readonly params?: PathParams;
  readonly query?: QueryValues;
}

/** Fetches files of the API and hands them to the browser to keep. Refusals arrive as from `Api`, readable by `problemOf`. */
@Injectable({ providedIn: 'root' })
export class Download {
  private readonly http = inject(HttpClient);
  private readonly document = inject(DOCUMENT);

  /** Saves the file under the name that the server gives it; emits that name. */
  save(endpoint: Endpoint, { params, query }: DownloadInput): Observable<string> {
    const url = endpointUrl(endpoint, params, query);
    return this.http.get(url, { responseType: 'blob', observe: 'response' }).pipe(
      map((answer) => this.keep(answer)),
      // The refusal came as a blob as well; its words are inside.
      catchError((error: unknown) => from(readable(error)).pipe(switchMap((read) => throwError(() => read)))),
    );
  }

  private keep(answer: HttpResponse<Blob>): string {
    const name = fileName(answer.headers.get('Content-Disposition')) ?? 'stillstroke';
    const address = URL.createObjectURL(answer.body ?? new Blob());
    const link = this.document.createElement('a');
    link.href = address;
    link.download = name;
    this.document.body.append(link);
    link.click();
    link.remove();
    // Some browsers read the address only after this turn.
    setTimeout(() => URL.revokeObjectURL(address), 60_000);
    return name;
  }
}

/** The name in a Content-Disposition; null where there is none. */
export function fileName(disposition: string | null): string | null {
  return /filename="([^"]+)"/.exec(disposition ?? '')?.[1] ?? null;
}

async function readable(error: unknown): Promise<unknown> {
  if (!(error instanceof HttpErrorResponse) || !(error.error instanceof Blob)) return error;
  const { status, statusText, headers, url } = error;
  const more = url === null ? {} : { url };
  try {
    const body: unknown = JSON.parse(await error.error.text());
    return new HttpErrorResponse({ error: body, status, statusText, headers, ...more });
  } catch {
    // Not JSON: the status alone has to do.
    return error;
  }
}
