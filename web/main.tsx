import { StrictMode } from 'react'
import { createRoot } from 'react-dom/client'
import { RouterProvider } from 'react-router-dom'
import { Providers } from '#web/app/providers.tsx'
import { createRouter } from '#web/app/router.tsx'
import { startTheme } from '#web/lib/theme.ts'
import './styles.css'

const root = document.getElementById('root')
if (root === null) throw new Error('The page has no #root to draw into')

startTheme()
createRoot(root).render(
  <StrictMode>
    <Providers>
      <RouterProvider router={createRouter()} />
    </Providers>
  </StrictMode>,
)
