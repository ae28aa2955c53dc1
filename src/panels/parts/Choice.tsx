/** A few ways to see something, one of them chosen; a row of native radio buttons. */
export function Choice<T extends string>(props: {
  name: string
  options: readonly (readonly [value: T, words: string])[]
  value: T
  onChoose: (value: T) => void
}) {
  return (
    <fieldset className="choice">
      <legend>{props.name}</legend>
      {props.options.map(([value, words]) => (
        <label key={value}>
          <input
            type="radio"
            name={props.name}
            value={value}
            checked={props.value === value}
            onChange={() => props.onChoose(value)}
          />
          <span>{words}</span>
        </label>
      ))}
    </fieldset>
  )
}
