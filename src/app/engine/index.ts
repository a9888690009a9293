export { EngineBrokenError, EngineClient, type LiveAnswer, type LiveGrid } from './engine-client';
export { followLive, type FollowedAnswer } from './follow-live';
export { provideEngineClient } from './provide-engine-client';
