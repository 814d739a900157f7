/** The only barrel of the project. */
export * from './audit-entry.ts';
export * from './case.ts';
export * from './catalogue-entry.ts';
export * from './evidence.ts';
export * from './hold-test.ts';
export * from './machine.ts';
export * from './photo.ts';
export * from './refrigerant-book.ts';
export * from './search-document.ts';
export * from './session.ts';
export * from './shop.ts';
export * from './talk.ts';
export * from './user.ts';
export * from './write-up.ts';
