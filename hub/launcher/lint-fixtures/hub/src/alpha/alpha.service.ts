import { problem } from '../common/problem.js';

export class AlphaService {
  readonly problem = problem;
}
