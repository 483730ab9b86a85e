import './styles/tokens.css';
import './styles/global.css';
import 'katex/dist/katex.min.css';
import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { createEngineClient } from '../workers/client';
import { Desk } from './desk/desk';
import { TopBoundary } from './desk/top-boundary';
import { createSession, SessionContext } from './state/session';
import { keepOffline } from './storage/offline';

const root = document.getElementById('root');
if (!root) throw new Error('index.html has no element with the id root');

const session = createSession(createEngineClient());

createRoot(root).render(
  <StrictMode>
    <TopBoundary text={() => session.text.state.get().text}>
      <SessionContext value={session}>
        <Desk />
      </SessionContext>
    </TopBoundary>
  </StrictMode>,
);

void session.keeper.start();

keepOffline((takeOver) => {
  session.notices.say('A new version of Spherelathe is ready.', { label: 'Use it now', perform: takeOver });
}).catch(() => {
  // Without the offline cache the page works as long as there is a connection.
});
