import { designStore, useDesign } from '../state/useDesign'

/** A sentence about what could not be done, until it is closed or something changes. */
export function NoticeLine() {
  const notice = useDesign((state) => state.notice)
  return (
    <div className="notice-holder" role="status">
      {notice !== null && (
        <p className="notice">
          {notice}
          <button type="button" className="button" onClick={() => designStore.getState().say(null)}>
            Close
          </button>
        </p>
      )}
    </div>
  )
}
