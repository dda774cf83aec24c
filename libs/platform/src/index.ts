export * from './config';
export * from './tokens';
export * from './platform.module';
export * from './project-root';
export * from './queue/queue.module';
export * from './queue/dispatcher';
export * from './thread-pools';
export * from './within';
