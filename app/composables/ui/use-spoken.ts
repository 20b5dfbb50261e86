/** Says words to a screen reader at once, without showing them: why a press is blocked, where a carried coat is. */
export function useSpoken() {
  const spoken = useState('spoken', () => '')

  /** A word joiner is added where the same words come twice, since a screen reader passes over what did not change. */
  function speak(words: string) {
    spoken.value = spoken.value === words ? `${words}\u2060` : words
  }
  return { spoken, speak }
}
