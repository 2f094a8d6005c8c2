/** Why the server cannot start, in one sentence for whoever runs it that says what to do. */
export class StartProblem extends Error {
  constructor(sentence: string) {
    super(sentence);
    this.name = 'StartProblem';
  }
}
