import '../../features/importing/importing.css'

export { BringPage } from '../../features/importing/components/BringPage'
export { UnderstoodPage } from '../../features/importing/components/UnderstoodPage'
