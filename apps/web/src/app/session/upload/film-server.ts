import { HttpClient, HttpRequest, type HttpEvent } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Clip } from '@stillstroke/contract/clip-facts';
import { updateClip, uploadClip } from '@stillstroke/contract/clips';
import type { Observable } from 'rxjs';
import { Api } from '../../core/api/api';
import { endpointUrl } from '../../core/api/endpoint-url';
import type { FilmFields } from './film-fields';
import type { UploadServer } from './upload-queue';

/** Sends films to a session. */
@Injectable({ providedIn: 'root' })
export class FilmServer {
  private readonly http = inject(HttpClient);
  private readonly api = inject(Api);

  /** The calls that a queue of this session needs. */
  of(sessionId: string): UploadServer {
    return {
      send: (file, fields) => this.send(sessionId, file, fields),
      save: (id, changes) => this.api.call(updateClip, { params: { id }, body: changes }),
    };
  }

  private send(sessionId: string, file: File, fields: FilmFields): Observable<HttpEvent<Clip>> {
    const form = new FormData();
    // Fields go first, so that the server can refuse a bad one before two gigabytes have come.
    for (const [name, value] of Object.entries(fields)) form.append(name, String(value));
    form.append('video', file, file.name);
    const url = endpointUrl(uploadClip, { id: sessionId });
    return this.http.request<Clip>(new HttpRequest('POST', url, form, { reportProgress: true }));
  }
}
