// A failure that the script knows about, told to the error box of guard.js.

class Fault extends Error {
    constructor(what, advice, cause) {
        super(what);
        this.advice = advice;
        this.reason = cause;
    }
}

function showFault(title, error) {
    const known = error instanceof Fault;
    document.dispatchEvent(
        new CustomEvent('steelyard-fault', {
            detail: {
                title,
                what: known ? error.message : 'Something went wrong that the program did not expect.',
                advice: known ? error.advice : 'Reload the page. What was kept in this browser is still there.',
                error: known ? error.reason : error,
            },
        })
    );
}
