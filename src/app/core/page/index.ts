export { Page, pageHead, type PageHead, type Step } from './page';
