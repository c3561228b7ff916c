import { VueQueryPlugin } from '@tanstack/vue-query'
import { createPinia } from 'pinia'
import { createApp } from 'vue'
import App from './App.vue'
import { queryClient } from './plugins/query'
import { makeVuetify } from './plugins/vuetify'
import { makeRouter } from './router'
import { useAppearanceStore } from './stores/appearance'
import './styles/index.css'

const app = createApp(App)
app.use(createPinia())

// Before anything is drawn, or a night reader sees a white flash.
const { appearance } = useAppearanceStore()
document.documentElement.dataset.appearance = appearance

app.use(makeVuetify(appearance))
app.use(VueQueryPlugin, { queryClient })
app.use(makeRouter())
app.mount('#app')
