import { register } from './register';
import { choosePassword, signIn, signOut } from './session';

export const server = { signIn, signOut, choosePassword, ...register };
