export { type Environment, EnvironmentError, environment, parseEnvironment } from './environment';
