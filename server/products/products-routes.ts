import { Router } from 'express';
import { mount } from '../http/mount';
import { type ProductsService } from './products-service';

export function productsRoutes(service: ProductsService): Router {
  const router = Router();
  mount(router, 'listProducts', ({ actor, query }) => service.list(actor, query));
  mount(router, 'readProduct', ({ actor, params }) => service.read(actor, params.productId));
  mount(router, 'addProduct', ({ actor, body }) => service.add(actor, body));
  mount(router, 'listKits', ({ actor, query }) => service.listKits(actor, query));
  mount(router, 'addKit', ({ actor, body }) => service.addKit(actor, body));
  mount(router, 'readKit', ({ actor, params }) => service.readKit(actor, params.kitId));
  mount(router, 'editKit', ({ actor, params, version, body }) => service.editKit(actor, params.kitId, version, body));
  return router;
}
