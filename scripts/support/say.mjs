/** Something the person must mend; printed as one sentence without a stack. */
export class Advice extends Error {}

export const say = (text) => console.log(text)

/** Runs a script's main function: advice is printed plainly, a mistake of ours with its stack. */
export function run(main) {
  main().catch((error) => {
    console.error(error instanceof Advice ? `\n${error.message}` : error)
    process.exitCode = 1
  })
}
