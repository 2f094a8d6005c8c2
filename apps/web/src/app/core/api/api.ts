import { HttpClient, httpResource, type HttpResourceRef } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { AnswerOf, BodyInputOf, Endpoint } from '@stillstroke/contract/endpoint';
import type { Observable } from 'rxjs';
import { endpointUrl, type PathParams, type QueryValues } from './endpoint-url';

interface CallInput<E> {
  readonly params?: PathParams;
  readonly query?: QueryValues;
  readonly body?: BodyInputOf<E>;
}

/** Calls of the HTTP surface by their description in the contract; paths are written nowhere else in the app. */
@Injectable({ providedIn: 'root' })
export class Api {
  private readonly http = inject(HttpClient);

  /** One request when subscribed. Refusals arrive as HttpErrorResponse; see `problemOf`. */
  call<E extends Endpoint>(endpoint: E, input: CallInput<E> = {}): Observable<AnswerOf<E>> {
    const url = endpointUrl(endpoint, input.params, input.query);
    return this.http.request<AnswerOf<E>>(endpoint.method.toUpperCase(), url, { body: input.body });
  }
}

/**
 * A read that follows its signals: asks again when the input changes, idle while it is undefined.
 * Must be created in an injection context, as `httpResource` is.
 */
export function apiResource<E extends Endpoint>(
  endpoint: E,
  input: () => { params?: PathParams; query?: QueryValues } | undefined,
): HttpResourceRef<AnswerOf<E> | undefined> {
  return httpResource<AnswerOf<E>>(() => {
    const given = input();
    return given && endpointUrl(endpoint, given.params, given.query);
  });
}
