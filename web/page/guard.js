// Its own script, in the oldest language, so that it runs where the program's script does not even parse. Shows the
// error box for whatever reaches the window unhandled, and for the event 'steelyard-fault' that the program's
// script sends.
(function () {
    'use strict';

    function show(title, what, advice, details) {
        var box = document.getElementById('fault');
        var start = document.getElementById('start');
        if (!box.hidden) {
            return; // The first error says more than those that follow from it.
        }
        box.querySelector('h1').textContent = title;
        box.querySelector('.what').textContent = what;
        box.querySelector('.advice').textContent = advice;
        box.querySelector('pre').textContent = details + '\n' + navigator.userAgent + '\n' + location.protocol;
        box.hidden = false;
        if (start) {
            start.hidden = true;
            start.style.display = 'none';
        }
    }

    function describe(error, fallback) {
        if (!error) {
            return String(fallback);
        }
        return String(error) + (error.stack ? '\n' + error.stack : '');
    }

    function unexpected(details) {
        show(
            document.getElementById('start') ? 'Steelyard could not start' : 'Steelyard met an error',
            'Something went wrong that the program did not expect.',
            'Reload the page. What was kept in this browser is still there.',
            details
        );
    }

    window.addEventListener('error', function (event) {
        unexpected(describe(event.error, event.message));
    });
    window.addEventListener('unhandledrejection', function (event) {
        unexpected(describe(event.reason, 'a promise was rejected'));
    });
    document.addEventListener('steelyard-fault', function (event) {
        var fault = event.detail;
        show(fault.title, fault.what, fault.advice, describe(fault.error, ''));
    });
})();
