export * from './departments';
export * from './courses';
export * from './sign-in';
export * from './scores';
export * from './readings';
export * from './assignments';
export * from './questions';
export * from './work';
