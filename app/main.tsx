import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { keepOffline } from './storage/offline';

const root = document.getElementById('root');
if (!root) throw new Error('index.html has no element with the id root');

createRoot(root).render(
  <StrictMode>
    <main>
      <h1>Spherelathe</h1>
      <p>The notebook is not built yet.</p>
    </main>
  </StrictMode>,
);

void keepOffline((takeOver) => {
  if (window.confirm('A new version is ready. Load it now?')) takeOver();
});
