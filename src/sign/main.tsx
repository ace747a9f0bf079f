import { createRoot } from 'react-dom/client';
import './sign.css';
import { SignPage } from './SignPage.tsx';

const token = /^\/s\/([^/]+)/.exec(location.pathname)?.[1] ?? '';
const root = document.getElementById('root');
if (root) createRoot(root).render(<SignPage token={token} />);
