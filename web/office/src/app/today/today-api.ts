import { httpResource } from '@angular/common/http';
import { Injectable } from '@angular/core';
import { type Today } from '#shared/today';
import { answerOf, requestOf } from '../contract/contract-request';

/** What needs a person now. */
@Injectable({ providedIn: 'root' })
export class TodayApi {
  today() {
    return httpResource<Today>(() => requestOf('readToday', {}), { parse: answerOf('readToday') });
  }
}
