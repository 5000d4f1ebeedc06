import './theme.css'
import { QueryClientProvider } from '@tanstack/react-query'
import { StrictMode } from 'react'
import { createRoot } from 'react-dom/client'
import { RouterProvider } from 'react-router-dom'
import { createQueryClient } from '../api/queryClient.ts'
import { applyKeptTheme } from './nightTheme.ts'
import { createRouter } from './router.tsx'

applyKeptTheme()
const queryClient = createQueryClient()
const router = createRouter()

const root = document.getElementById('root')
if (!root) throw new Error('index.html has no #root')
createRoot(root).render(
  <StrictMode>
    <QueryClientProvider client={queryClient}>
      <RouterProvider router={router} />
    </QueryClientProvider>
  </StrictMode>,
)
