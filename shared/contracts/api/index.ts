export * from './identity';
export * from './people';
export * from './problem';
export * from './products';
export * from './runs';
export * from './scenarios';
export * from './session';
