import { httpResource } from '@angular/common/http';
import { type Signal } from '@angular/core';
import type * as z from 'zod';
import { ContainerLabel, type LabelQuery } from '#shared/library';
import { requestOf } from '../../contract/contract-request';

/** The label of a kit in one state, or of one product as it came. */
export function labelResource(kitId: Signal<string | undefined>, productId: Signal<string | undefined>, state: Signal<z.infer<typeof LabelQuery>['state']>) {
  return httpResource<ContainerLabel>(
    () => {
      const [kit, product] = [kitId(), productId()];
      if (kit !== undefined) return requestOf('readKitLabel', { params: { kitId: kit }, query: { state: state() } });
      return product === undefined ? undefined : requestOf('readProductLabel', { params: { productId: product } });
    },
    { parse: (answer) => ContainerLabel.parse(answer) },
  );
}
