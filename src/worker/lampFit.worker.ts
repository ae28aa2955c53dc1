import { expose } from 'comlink'
import { fitService } from './lampFit'

expose(fitService())
