import { expose } from 'comlink';
import { createEngineApi } from './api';
import { isStillWanted } from './stop-token';

expose(createEngineApi(() => performance.now() / 1000, isStillWanted));
