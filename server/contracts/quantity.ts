export * from '#physics/quantity';
