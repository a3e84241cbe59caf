export * from '#physics/vibration-document';
