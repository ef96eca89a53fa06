import './assets/fonts.css'
import './plugins/zod.ts'
import { PiniaColada } from '@pinia/colada'
import { createPinia } from 'pinia'
import { createApp } from 'vue'
import App from './App.vue'
import './assets/base.css'
import './assets/print.css'
import { connectApi } from './plugins/connect-api.ts'
import { createVuetifyPlugin } from './plugins/vuetify.ts'
import { router } from './router/index.ts'
import { usePreferences } from './stores/preferences.ts'

const app = createApp(App)
const pinia = createPinia()
app.use(pinia)
app.use(PiniaColada, { queryOptions: { staleTime: 10_000 } })
app.use(createVuetifyPlugin(usePreferences(pinia).theme))
app.use(router)
connectApi(pinia)
app.mount('#app')
