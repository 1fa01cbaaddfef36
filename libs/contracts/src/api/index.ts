export * from './boards';
export * from './channels';
export * from './common';
export * from './masks';
export * from './people';
export * from './problem';
export * from './session';
export * from './stream';
