import { ref } from 'vue'

/** A dialog with a form: open for a new row (null) or for one that is there. The key makes a fresh form each time. */
export function useFormDialog<Row>() {
  const isOpen = ref(false)
  const row = ref<Row | null>(null)
  const turn = ref(0)
  function open(of: Row | null): void {
    row.value = of as typeof row.value
    turn.value += 1
    isOpen.value = true
  }
  return { isOpen, row, turn, open }
}
