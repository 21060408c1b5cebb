declare module '*?first' {
  export const words: object
}
declare module '*?rest' {
  export const words: object
}
