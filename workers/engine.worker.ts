import { expose } from 'comlink';
import { createEngineApi } from './api';

expose(createEngineApi(() => performance.now() / 1000));
