import { createRoot } from 'react-dom/client';
import { App } from '#app/app.tsx';
import { applyTheme, printOnPaper } from '#lib/preferences.ts';
import './styles/index.css';

applyTheme();
printOnPaper();
createRoot(document.getElementById('root')!).render(<App />);
