#include "core/decision/unknown_members.hpp"

#include <string>
#include <utility>

#include "core/decision/members.hpp"

namespace steelyard {
namespace {

/// Visits every object of a decision with its pointer; plain members do not matter here.
class Walker {
public:
    Walker(std::string at, std::vector<Notice>& notices) : at_(std::move(at)), notices_(notices) {}

    template<class T>
    void walk(const T& object) {
        for (const auto& member : object.extras.unknown) {
            if (notices_.size() == max_problems) return;
            notices_.push_back({"unknown-member",
                                "The member \"" + member.name + "\" is not known here; it is kept as it is.",
                                at_ + pointer_part(member.name)});
        }
        members(*this, object);
    }

    template<class T>
    void list(const char* name, const std::vector<T>& objects) {
        for (std::size_t i = 0; i < objects.size(); ++i) {
            Walker(at_ + "/" + name + "/" + std::to_string(i), notices_).walk(objects[i]);
        }
    }
    template<class T>
    void needed_list(const char* name, const std::vector<T>& objects) {
        list(name, objects);
    }
    template<class T>
    void object(const char* name, const T& object) {
        Walker(at_ + "/" + name, notices_).walk(object);
    }
    template<class T>
    void needed_object(const char* name, const T& object) {
        this->object(name, object);
    }
    template<class T>
    void maybe_object(const char* name, const std::optional<T>& object) {
        if (object) this->object(name, *object);
    }

    void format() {}
    template<class T>
    void id(const char*, const T&) {}
    template<class T>
    void maybe_id(const char*, const T&) {}
    template<class T>
    void text(const char*, const T&) {}
    template<class T>
    void needed_text(const char*, const T&) {}
    template<class T>
    void person_or_room(const char*, const T&) {}
    template<class T>
    void number(const char*, const T&) {}
    template<class T>
    void number_or(const char*, const T&, double) {}
    template<class T>
    void maybe_number(const char*, const T&) {}
    template<class T>
    void count_or(const char*, const T&, int) {}
    template<class T>
    void maybe_count(const char*, const T&) {}
    template<class T>
    void seed(const char*, const T&) {}
    template<class T>
    void flag(const char*, const T&) {}
    template<class T>
    void word(const char*, const T&, const T& = T{}) {}
    template<class T>
    void needed_word(const char*, const T&) {}
    template<class T>
    void words(const char*, const T&) {}
    template<class T>
    void ids(const char*, const T&) {}
    template<class T>
    void id_pairs(const char*, const T&) {}
    template<class T>
    void numbers_by_id(const char*, const T&) {}
    template<class T>
    void node_kind(const T&) {}
    template<class T>
    void curve_shape(const T&) {}

private:
    std::string at_;
    std::vector<Notice>& notices_;
};

} // namespace

std::vector<Notice> unknown_member_notices(const Decision& decision) {
    std::vector<Notice> notices;
    Walker("", notices).walk(decision);
    return notices;
}

} // namespace steelyard
