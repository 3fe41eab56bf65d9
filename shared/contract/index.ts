/** The contract between client and server: schemas, types, permissions, problems and paths. */
export * from './account';
export * from './biometry-import';
export * from './calendar';
export * from './common';
export * from './decimal-text';
export * from './free-text';
export * from './lens';
export * from './measurement';
export * from './measurement-as-text';
export * from './measurement-text';
export * from './paths';
export * from './patient';
export * from './patient-text';
export * from './plan';
export * from './problem';
export * from './roles';
