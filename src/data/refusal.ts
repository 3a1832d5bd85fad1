/**
 * Something a researcher asked for that cannot be done with these data: the message is the sentence shown in the cell
 * (what is wrong, where, what to do). Anything else that is thrown is a defect of the program.
 */
export class Refusal extends Error {
  override readonly name = 'Refusal';
}
