export { startMailDelivery, type MailDelivery } from './mail-delivery';
export { mailRoutes } from './mail.routes';
export { deliverDueLetters, postLetter, type DeliverDependencies } from './mail.usecases';
