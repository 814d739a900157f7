import { reactRouter } from '@react-router/dev/vite';
import tailwindcss from '@tailwindcss/vite';
import { defineConfig } from 'vite';

export default defineConfig({
  publicDir: false,
  plugins: [tailwindcss(), reactRouter()],
  build: { assetsInlineLimit: 0 },
});
