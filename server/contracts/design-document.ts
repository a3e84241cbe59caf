export * from '#physics/design-document';
