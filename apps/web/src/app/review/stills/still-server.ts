import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { addStill, replaceStill, type AboutStill, type Still } from '@stillstroke/contract/stills';
import type { Observable } from 'rxjs';
import { endpointUrl } from '../../core/api/endpoint-url';

/** Sends pictures with what is said about them. */
@Injectable({ providedIn: 'root' })
export class StillServer {
  private readonly http = inject(HttpClient);

  add(findingId: string, about: AboutStill, picture: Blob): Observable<Still> {
    return this.http.post<Still>(endpointUrl(addStill, { id: findingId }), formOf(about, picture));
  }

  replace(stillId: string, about: AboutStill, picture: Blob): Observable<Still> {
    return this.http.put<Still>(endpointUrl(replaceStill, { id: stillId }), formOf(about, picture));
  }
}

function formOf(about: AboutStill, picture: Blob): FormData {
  const form = new FormData();
  form.append('about', JSON.stringify(about));
  form.append('picture', picture, 'still.jpg');
  return form;
}
