export { esc as escapeHtml } from '@/writeup/escape';
