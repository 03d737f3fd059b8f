#pragma once

// What the page's scripts give the program; web/library.js passes each call on to the object `host` in
// web/page/host.js. Texts are UTF-8. A request number comes back, exactly once, in one of the answers of
// web/answers.cpp.
extern "C" {

/// `length` random bytes of cryptographic quality.
void host_random(unsigned char* bytes, int length);

/// The program stopped on an error: shows it and ends the loop.
void host_failed(const char* problem);

void host_save_file(int request, const char* name, const char* media_type, const char* text, int length);
void host_pick_file();
void host_copy_text(const char* text);

void host_list_kept(int request);
void host_load_kept(int request, const char* id);
void host_store(int request, const char* id, const char* title, const char* text, int length,
                const char* saved_at, double revision);
void host_forget(int request, const char* id);
void host_claim(int request, const char* id, int take_over);

void host_set_title(const char* title);
void host_set_unsaved(int unsaved);
int host_prefers_dark();

/// Where the text caret is, in CSS pixels, for input methods.
void host_set_caret(float x, float y, float line_height);

} // extern "C"
