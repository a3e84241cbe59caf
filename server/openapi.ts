import { OpenAPIRegistry, OpenApiGeneratorV31 } from '@asteasolutions/zod-to-openapi';
import { allRoutes } from '#contracts/routes';

export function openApi(version: string) {
  const registry = new OpenAPIRegistry();
  void allRoutes;
  return new OpenApiGeneratorV31(registry.definitions).generateDocument({
    openapi: '3.1.0',
    info: { title: 'Tremolode', version },
  });
}
